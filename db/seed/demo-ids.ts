import { createHash } from 'node:crypto';

/** The same name gives the same id on every machine: seeding twice meets what is there already. */
export function demoId(name: string): string {
  const hex = createHash('sha256').update(`harbour-mri/${name}`).digest('hex');
  // Version 8 (made by a rule of our own) and the variant every id carries.
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-8${hex.slice(13, 16)}-a${hex.slice(17, 20)}-${hex.slice(20, 32)}`;
}

export const DEMO_SITE_ID = demoId('site');
