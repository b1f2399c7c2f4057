import { isAction, PERMISSIONS } from '@/lib/domain/access';

/** What is logged without being a permission. */
const OTHERS: Readonly<Record<string, string>> = {
  'account.sign-in': 'sign in',
  'account.set-password': 'choose a password from a mailed link',
  'account.ask-password-link': 'ask for a password link',
};

export const AUDIT_ONLY_ACTIONS = Object.keys(OTHERS);

/** An action of the audit log in words; the name itself when this version does not know it any more. */
export function auditWords(action: string): string {
  return isAction(action) ? PERMISSIONS[action].description : (OTHERS[action] ?? action);
}
