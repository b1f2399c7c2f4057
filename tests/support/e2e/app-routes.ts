import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { fileURLToPath } from 'node:url';

const APP = fileURLToPath(new URL('../../../app/', import.meta.url));

export interface AppRoute {
  /** As it is asked for: folders in brackets filled in. */
  readonly address: string;
  /** Methods it exports; a page answers GET. */
  readonly methods: readonly string[];
}

/** Every page and route handler there is, read from the folders that make them. */
export function appRoutes(fill: (name: string) => string): readonly AppRoute[] {
  return readdirSync(APP, { recursive: true, encoding: 'utf8' })
    .filter((file) => /(^|\/)(page\.tsx|route\.ts)$/.test(file))
    .map((file) => {
      const segments = path.dirname(file).split(path.sep).filter((segment) => segment !== '.' && !/^\(.*\)$/.test(segment));
      const address = `/${segments.map((segment) => segment.replace(/^\[+(?:\.\.\.)?(\w+)\]+$/, (_all, name: string) => fill(name))).join('/')}`;
      const exported = [...readFileSync(path.join(APP, file), 'utf8').matchAll(/export (?:const|async function|function) (GET|POST|PUT|PATCH|DELETE)\b/g)].map(([, method]) => method!);
      return { address, methods: file.endsWith('page.tsx') ? ['GET'] : exported };
    });
}
