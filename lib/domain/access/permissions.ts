import type { Role } from './role';
import type { Scope } from './scope';

export interface Permission {
  /** Plain words, completed from "may …"; shown to leads and in the audit log. */
  readonly description: string;
  readonly roles: readonly Role[];
  /** The token scope that grants the same; absent: no token may. */
  readonly scope?: Scope;
  /** The worker may do it for the site on whose behalf a job was queued. */
  readonly system?: true;
  /** The holder of a link may do it to the linked subject. */
  readonly link?: true;
  /** Only to one's own account. */
  readonly self?: true;
}

const EVERYONE: readonly Role[] = ['radiographer', 'coordinator', 'lead', 'radiologist', 'educator'];
const CLINICAL: readonly Role[] = ['radiographer', 'coordinator', 'lead', 'radiologist'];
const PLANNERS: readonly Role[] = ['radiographer', 'lead'];
const PATHWAY: readonly Role[] = ['coordinator', 'lead'];
const SIZERS: readonly Role[] = ['radiographer', 'coordinator', 'lead'];
const TEACHERS: readonly Role[] = ['educator', 'lead'];
const LEADS: readonly Role[] = ['lead'];

/** The one permission table. Nothing else in the product lists roles. */
const TABLE = {
  'site.read': { description: "see the site's name and time zone", roles: EVERYONE, system: true },
  'site.edit': { description: "change the site's name and reference pattern", roles: LEADS },

  'check.run': { description: 'run the check on a typed or sent case', roles: EVERYONE, scope: 'check:run' },

  'booking.read': {
    description: 'read bookings and their pre-check results',
    roles: CLINICAL,
    scope: 'bookings:read',
    system: true,
  },
  'booking.create': { description: 'add a booking', roles: SIZERS, scope: 'bookings:write' },
  'booking.edit': { description: 'change a booking', roles: PATHWAY, scope: 'bookings:write' },
  'booking.import': { description: 'bring bookings in from a file', roles: PATHWAY, scope: 'bookings:write', system: true },
  'booking.export': { description: 'download bookings as CSV', roles: PATHWAY },
  'booking.check': { description: 'run the pre-check again', roles: SIZERS, system: true },
  'booking.propose': { description: 'propose another scanner or time', roles: PATHWAY },
  'booking.settle': { description: 'close or withdraw a proposed move', roles: PATHWAY, system: true },
  'booking.escalate': { description: 'ask a lead to decide about a booking', roles: SIZERS },
  'booking.decide': { description: 'decide an escalated booking', roles: LEADS },
  'booking.note': { description: 'write a note on a booking', roles: CLINICAL },
  'booking.erase': { description: 'erase a booking when its keeping time is over', roles: [], system: true },

  'size-reading.read': { description: 'read sizes', roles: CLINICAL, scope: 'bookings:read', system: true },
  'size-reading.record': { description: 'record or correct sizes', roles: SIZERS, scope: 'sizes:write' },

  'size-request.read': { description: 'see size requests', roles: SIZERS, system: true },
  'size-request.send': { description: 'ask for sizes by link', roles: PATHWAY },
  'size-request.cancel': { description: 'cancel a size request', roles: PATHWAY, system: true },
  'size-request.answer': { description: 'answer a size request', roles: [], link: true },

  'keep-clear.request': { description: 'set the keep-clear area and tolerated fold asked for', roles: ['radiologist', 'lead'] },

  'plan.read': { description: 'read plans and plan sheets', roles: CLINICAL, scope: 'plans:read', system: true },
  'plan.create': { description: 'start a plan', roles: PLANNERS, scope: 'plans:write' },
  'plan.edit': { description: 'adopt remedies and save plan versions', roles: PLANNERS, scope: 'plans:write' },
  'plan.release': { description: 'put a plan for use', roles: PLANNERS },
  'plan.withdraw': { description: 'take a plan back to draft', roles: PLANNERS },
  'plan.use': { description: 'mark a plan as used', roles: PLANNERS },
  'plan.ask-sign-off': { description: 'ask a radiologist to sign a plan off', roles: PLANNERS },
  'plan.sign-off': { description: 'sign a plan off', roles: ['radiologist'] },
  'plan.send-back': { description: 'send a plan back with a reason', roles: ['radiologist'] },
  'plan.render': { description: 'make a plan sheet as PDF', roles: CLINICAL, system: true },

  'outcome.read': { description: 'read outcomes', roles: CLINICAL, scope: 'outcomes:read', system: true },
  'outcome.record': { description: 'record an outcome', roles: PLANNERS, scope: 'outcomes:write' },

  'scanner.read': { description: 'read scanners', roles: EVERYONE, scope: 'setup:read', system: true },
  'scanner.edit': { description: 'add and change scanners', roles: LEADS },
  'scanner-session.edit': { description: 'enter scanner sessions', roles: PATHWAY },
  'protocol.read': { description: 'read protocols', roles: EVERYONE, scope: 'setup:read', system: true },
  'protocol.edit': { description: 'add and change protocols', roles: LEADS },
  'policy.read': { description: 'read site policy', roles: EVERYONE, scope: 'setup:read', system: true },
  'policy.edit': { description: "change the site policy's limits and weights", roles: LEADS },

  'review.read': { description: 'read the defaults review and calibration', roles: LEADS, system: true },
  'review.run': { description: 'run the defaults review', roles: LEADS, system: true },
  'review.decide': { description: 'accept or decline a proposed default', roles: LEADS },

  'demonstration.read': { description: 'open and present demonstrations', roles: EVERYONE, system: true },
  'demonstration.edit': { description: 'build and change demonstrations', roles: TEACHERS },
  'demonstration.render': { description: 'make a hand-out as PDF', roles: TEACHERS, system: true },
  'demonstration.share': { description: 'make and revoke share links', roles: TEACHERS },
  'demonstration.view': { description: 'look at a shared demonstration', roles: [], link: true },

  'person.read': { description: 'see who has an account and in which roles', roles: LEADS },
  'person.invite': { description: 'invite a person', roles: LEADS },
  'person.edit': { description: "change a person's name and roles", roles: LEADS },
  'person.disable': { description: 'disable an account or enable it again', roles: LEADS },
  'person.sign-out': { description: 'sign a person out everywhere', roles: LEADS },

  'account.read': { description: 'see their own account', roles: EVERYONE, self: true },
  'account.change-password': { description: 'change their own password', roles: EVERYONE, self: true },
  'account.sign-out-everywhere': { description: 'sign themselves out everywhere', roles: EVERYONE, self: true },

  'api-token.read': { description: 'see API tokens', roles: LEADS },
  'api-token.create': { description: 'make an API token', roles: LEADS },
  'api-token.revoke': { description: 'revoke an API token', roles: LEADS },

  'mail.read': { description: 'see mail that was sent, waits or bounced', roles: PATHWAY, system: true },
  'mail.read-caught': { description: 'read what the local mail catcher holds, links and all', roles: LEADS },
  'mail.retry': { description: 'send a failed mail again', roles: PATHWAY },
  'mail.send': { description: 'hand queued mail to the mail server', roles: [], system: true },

  'audit.read': { description: 'read the audit log', roles: LEADS },
} as const satisfies Record<string, Permission>;

export type Action = keyof typeof TABLE;
export const PERMISSIONS: Readonly<Record<Action, Permission>> = TABLE;
export const ACTIONS = Object.keys(TABLE) as Action[];

export function isAction(value: unknown): value is Action {
  return typeof value === 'string' && Object.hasOwn(TABLE, value);
}
