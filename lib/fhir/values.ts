/** Looking into JSON that may be anything. */
export type Json = Readonly<Record<string, unknown>>;

export const asObject = (value: unknown): Json => (typeof value === 'object' && value !== null && !Array.isArray(value) ? (value as Json) : {});
export const asList = (value: unknown): readonly Json[] => (Array.isArray(value) ? value.map(asObject) : []);
export const asText = (value: unknown): string => (typeof value === 'string' ? value : '');

export interface Coding {
  readonly system: string;
  readonly code: string;
  readonly display: string;
}

export const codingsOf = (concept: unknown): Coding[] =>
  asList(asObject(concept).coding).map(({ system, code, display }) => ({ system: asText(system), code: asText(code), display: asText(display) }));

/** The names a thing may be known by here: the codes, displays and text of a concept. */
export function namesOf(concept: unknown): string[] {
  return [asText(asObject(concept).text), ...codingsOf(concept).flatMap(({ code, display }) => [display, code])].filter((name) => name !== '');
}
