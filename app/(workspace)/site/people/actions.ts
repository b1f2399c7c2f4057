'use server';

import { runAction } from '@/lib/http/run-action';
import type { EditPersonInput, InvitePersonInput } from '@/lib/schemas/people/person';
import { disablePerson } from '@/lib/services/people/disable-person';
import { editPerson } from '@/lib/services/people/edit-person';
import { enablePerson } from '@/lib/services/people/enable-person';
import { invitePerson } from '@/lib/services/people/invite-person';
import { resendInvitation } from '@/lib/services/people/resend-invitation';
import { signOutPerson } from '@/lib/services/people/sign-out-person';

interface PersonId {
  readonly id: string;
}

export async function invitePersonAction(input: InvitePersonInput) {
  return runAction('invite a person', (context) => invitePerson(context, input));
}

export async function editPersonAction(input: EditPersonInput) {
  return runAction('edit a person', (context) => editPerson(context, input));
}

export async function resendInvitationAction(input: PersonId) {
  return runAction('send an invitation again', (context) => resendInvitation(context, input));
}

export async function signOutPersonAction(input: PersonId) {
  return runAction('sign a person out', (context) => signOutPerson(context, input));
}

export async function disablePersonAction(input: PersonId) {
  return runAction('disable an account', (context) => disablePerson(context, input));
}

export async function enablePersonAction(input: PersonId) {
  return runAction('enable an account', (context) => enablePerson(context, input));
}
