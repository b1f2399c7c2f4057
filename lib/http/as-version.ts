/** A version number from an address; undefined for anything that is none. */
export function asVersion(text: string | string[] | undefined): number | undefined {
  return typeof text === 'string' && /^[1-9]\d{0,5}$/.test(text) ? Number(text) : undefined;
}
