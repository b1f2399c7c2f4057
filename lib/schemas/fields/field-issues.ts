import '@/lib/schemas/fields/jitless';
import type * as z from 'zod';

/** What is wrong with one field: dotted path ('' is the whole), and what was given and is allowed. */
export interface FieldIssue {
  readonly path: string;
  readonly message: string;
}

type Issue = z.core.$ZodIssue;

/** Of the alternatives that all failed, the one the writer most likely meant: it got furthest in. */
function nearestBranch(branches: readonly (readonly Issue[])[]): readonly Issue[] | undefined {
  const isWrongType = (issues: readonly Issue[]) =>
    issues.some((issue) => issue.path.length === 0 && issue.code === 'invalid_type');
  const meant = branches.filter((issues) => issues.length > 0 && !isWrongType(issues));
  return meant.length === 0 ? undefined : meant.reduce((a, b) => (b.length < a.length ? b : a));
}

function flatten(issues: readonly Issue[], base: readonly PropertyKey[]): FieldIssue[] {
  return issues.flatMap((issue) => {
    const path = [...base, ...issue.path];
    if (issue.code === 'invalid_union') {
      const branch = nearestBranch(issue.errors);
      if (branch) return flatten(branch, path);
    }
    return [{ path: path.map(String).join('.'), message: issue.message }];
  });
}

/** Every refused field with its sentence, in the order of the schema. */
export function fieldIssues(error: z.ZodError): FieldIssue[] {
  return flatten(error.issues, []);
}

/** One sentence a field, as forms and problem details show them. */
export function fieldMessages(issues: readonly FieldIssue[]): Record<string, string> {
  const fields: Record<string, string> = {};
  for (const { path, message } of issues) {
    const key = path === '' ? '(whole)' : path;
    fields[key] = fields[key] === undefined ? message : `${fields[key]}; ${message}`;
  }
  return fields;
}
