'use server';

import { runAction } from '@/lib/http/run-action';
import type { ProtocolForm } from '@/lib/schemas/protocol';
import { archiveProtocol, restoreProtocol } from '@/lib/services/protocol/archive-protocol';
import { createProtocol } from '@/lib/services/protocol/create-protocol';
import { editProtocol } from '@/lib/services/protocol/edit-protocol';
import { getProtocol } from '@/lib/services/protocol/get-protocol';
import { toProtocolForm } from '@/components/protocol/to-protocol-form';

export async function addProtocol(_version: number, form: ProtocolForm) {
  return runAction('add a protocol', (context) => createProtocol(context, form));
}

export async function saveProtocol(id: string, expectedVersion: number, form: ProtocolForm) {
  return runAction('edit a protocol', (context) => editProtocol(context, { id, expectedVersion, form }));
}

export async function readProtocolForm(id: string) {
  return runAction('read a protocol', async (context) => toProtocolForm(await getProtocol(context, { id })));
}

export async function archiveProtocolAction(id: string, expectedVersion: number) {
  return runAction('archive a protocol', (context) => archiveProtocol(context, { id, expectedVersion }));
}

export async function restoreProtocolAction(id: string, expectedVersion: number) {
  return runAction('restore a protocol', (context) => restoreProtocol(context, { id, expectedVersion }));
}
