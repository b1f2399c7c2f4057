/** What an API token may be given. A token has no role: it can do what its scopes name and nothing more. */
export const SCOPES = [
  'check:run',
  'bookings:read',
  'bookings:write',
  'sizes:write',
  'plans:read',
  'plans:write',
  'outcomes:read',
  'outcomes:write',
  'setup:read',
] as const;
export type Scope = (typeof SCOPES)[number];

export const SCOPE_DESCRIPTIONS: Readonly<Record<Scope, string>> = {
  'check:run': 'Run the check on a case sent with the request; nothing is stored',
  'bookings:read': 'Read bookings, their pre-check results and proposed moves',
  'bookings:write': 'Add and change bookings, in bulk or one by one',
  'sizes:write': 'Add size readings to a booking',
  'plans:read': 'Read plans, their versions and plan sheets',
  'plans:write': 'Make plans and save new versions',
  'outcomes:read': 'Read recorded outcomes',
  'outcomes:write': 'Record outcomes',
  'setup:read': 'Read scanners, protocols and site policy',
};

export function isScope(value: unknown): value is Scope {
  return typeof value === 'string' && (SCOPES as readonly string[]).includes(value);
}
