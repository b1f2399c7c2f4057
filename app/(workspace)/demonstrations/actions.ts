'use server';

import { environment } from '@/lib/env';
import { runAction } from '@/lib/http/run-action';
import type { AddSceneInput, CreateDemonstrationInput, CreateShareInput, ImportDemonstrationInput, PutAwayInput, SaveDemonstrationInput } from '@/lib/schemas/demonstration';
import { addScene } from '@/lib/services/demonstration/add-scene';
import { createDemonstration } from '@/lib/services/demonstration/create-demonstration';
import { duplicateDemonstration } from '@/lib/services/demonstration/duplicate-demonstration';
import { importDemonstration } from '@/lib/services/demonstration/exchange-demonstration';
import { putAwayDemonstration } from '@/lib/services/demonstration/put-away-demonstration';
import { saveDemonstration } from '@/lib/services/demonstration/save-demonstration';
import { createShare, revokeShare } from '@/lib/services/demonstration/share-demonstration';

export async function createDemonstrationAction(input: CreateDemonstrationInput) {
  return runAction('make a demonstration', (context) => createDemonstration(context, input));
}

export async function importDemonstrationAction(input: ImportDemonstrationInput) {
  return runAction('bring a demonstration in', (context) => importDemonstration(context, input));
}

export async function saveDemonstrationAction(input: SaveDemonstrationInput) {
  return runAction('save a demonstration', (context) => saveDemonstration(context, input));
}

export async function duplicateDemonstrationAction(input: { readonly id: string }) {
  return runAction('copy a demonstration', (context) => duplicateDemonstration(context, input));
}

export async function putAwayDemonstrationAction(input: PutAwayInput) {
  return runAction('put a demonstration away', (context) => putAwayDemonstration(context, input));
}

export async function addSceneAction(input: AddSceneInput) {
  return runAction('add a scene', (context) => addScene(context, input));
}

export async function createShareAction(input: CreateShareInput) {
  return runAction('share a demonstration', async (context) => {
    const { secret, expiresAt } = await createShare(context, input);
    return { address: `${environment().publicUrl}/shown/${secret}`, expiresAt: expiresAt.toISOString() };
  });
}

export async function revokeShareAction(input: { readonly id: string }) {
  return runAction('revoke a shared link', (context) => revokeShare(context, input));
}
