'use server';

import { runAction } from '@/lib/http/run-action';
import type { ScannerForm } from '@/lib/schemas/scanner';
import { archiveScanner, restoreScanner } from '@/lib/services/scanner/archive-scanner';
import { createScanner } from '@/lib/services/scanner/create-scanner';
import { editScanner } from '@/lib/services/scanner/edit-scanner';
import { getScanner } from '@/lib/services/scanner/get-scanner';
import { toScannerForm } from '@/components/scanner/to-scanner-form';

export async function addScanner(_version: number, form: ScannerForm) {
  return runAction('add a scanner', (context) => createScanner(context, form));
}

export async function saveScanner(id: string, expectedVersion: number, form: ScannerForm) {
  return runAction('edit a scanner', (context) => editScanner(context, { id, expectedVersion, form }));
}

export async function readScannerForm(id: string) {
  return runAction('read a scanner', async (context) => toScannerForm(await getScanner(context, { id })));
}

export async function archiveScannerAction(id: string, expectedVersion: number) {
  return runAction('archive a scanner', (context) => archiveScanner(context, { id, expectedVersion }));
}

export async function restoreScannerAction(id: string, expectedVersion: number) {
  return runAction('restore a scanner', (context) => restoreScanner(context, { id, expectedVersion }));
}
