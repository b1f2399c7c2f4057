/** Just enough of a test runner to evaluate a test file afresh many times in one process. Assertions are Vitest's own. */
import { ASYMMETRIC_MATCHERS_OBJECT, chai, JestAsymmetricMatchers, JestChaiExpect } from '@vitest/expect';

export interface RegisteredTest {
  readonly name: string;
  readonly run: () => unknown;
}

chai.use(JestChaiExpect);
chai.use(JestAsymmetricMatchers);
const expect = Object.assign(
  (value: unknown, message?: string) => chai.expect(value, message),
  chai.expect,
  (globalThis as unknown as Record<symbol, object>)[ASYMMETRIC_MATCHERS_OBJECT],
);

type Body = (...given: unknown[]) => unknown;

/** The `vitest` a test file sees; its tests land in `tests`. */
export function vitestFor(tests: RegisteredTest[]): Record<string, unknown> {
  const groups: string[] = [];
  const it = (name: string, second: unknown, third?: unknown) => {
    const body = (typeof second === 'function' ? second : third) as Body;
    tests.push({ name: [...groups, name].join(' › '), run: () => body() });
  };
  const describe = (name: string, body: () => void) => {
    groups.push(name);
    body();
    groups.pop();
  };
  const each =
    (register: (name: string, body: Body) => void) =>
    (rows: readonly unknown[]) =>
    (name: string, body: Body) => {
      rows.forEach((row, index) =>
        register(`${name} [${index}]`, () => (Array.isArray(row) ? body(...(row as unknown[])) : body(row))),
      );
    };
  Object.assign(it, { each: each(it) });
  Object.assign(describe, { each: each((name, body) => describe(name, () => void body())) });
  return { it, test: it, describe, expect };
}
