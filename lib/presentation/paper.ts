/** Letter where it is the office paper (common practice, no source); A4 everywhere else. Asked of the reader's language. */
export function paperOf(acceptLanguage: string | null): 'A4' | 'Letter' {
  return /^\s*(en-US|en-CA|fr-CA|es-MX|es-US)\b/i.test(acceptLanguage ?? '') ? 'Letter' : 'A4';
}
