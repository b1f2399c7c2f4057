/** What a person may be at a site; one person may hold several. */
export const ROLES = ['radiographer', 'coordinator', 'lead', 'radiologist', 'educator'] as const;
export type Role = (typeof ROLES)[number];

export const ROLE_LABELS: Readonly<Record<Role, string>> = {
  radiographer: 'Radiographer',
  coordinator: 'Coordinator',
  lead: 'Lead',
  radiologist: 'Radiologist',
  educator: 'Educator',
};

export const ROLE_DESCRIPTIONS: Readonly<Record<Role, string>> = {
  radiographer: 'Plans on the bench, prints plan sheets, records outcomes.',
  coordinator: 'Brings bookings in, runs the pre-check, asks for sizes, proposes moves.',
  lead: 'Sets up scanners, protocols, policy, people and API tokens; reads the audit log.',
  radiologist: 'Sets keep-clear areas and tolerated fold; signs plans off or sends them back.',
  educator: 'Builds, presents and shares demonstrations.',
};

export function isRole(value: unknown): value is Role {
  return typeof value === 'string' && (ROLES as readonly string[]).includes(value);
}

/** Roles in the order of the list above, each once, so that stored arrays compare equal. */
export function normaliseRoles(roles: readonly Role[]): Role[] {
  return ROLES.filter((role) => roles.includes(role));
}
