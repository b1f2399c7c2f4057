/** The part of dcmjs that is used here; the package has no types of its own. */
declare module 'dcmjs' {
  export interface DictionaryEntry {
    readonly tag: string;
    readonly vr: string;
    readonly vm: string;
    readonly name: string;
  }
  export const data: {
    readonly DicomMetaDictionary: { readonly nameMap: Readonly<Record<string, DictionaryEntry | undefined>> };
  };
}
