type Json = unknown;

const isObject = (value: Json): value is Record<string, Json> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** Dotted names of the fields that differ, never their values: what the audit log may hold. Lists count as one field. */
export function changedFields(before: Json, after: Json, path = ''): string[] {
  if (isObject(before) && isObject(after)) {
    const keys = [...new Set([...Object.keys(before), ...Object.keys(after)])].sort();
    return keys.flatMap((key) => changedFields(before[key], after[key], path === '' ? key : `${path}.${key}`));
  }
  return JSON.stringify(before) === JSON.stringify(after) ? [] : [path];
}
