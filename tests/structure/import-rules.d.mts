export interface ImportRule {
  readonly files: readonly string[];
  readonly except?: readonly string[];
  readonly never: readonly string[];
  readonly allow?: readonly string[];
  readonly packages: readonly string[];
  readonly onlyFolders?: readonly string[];
  readonly onlyPackages?: readonly string[];
  readonly why: string;
}
export declare const importRules: readonly ImportRule[];
