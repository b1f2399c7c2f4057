'use client';

import { MadeFile } from '@/components/ui/made-file';

const FAILED = 'The sheet could not be made on one page, or the plan moved on meanwhile. Ask again, or print this page.';

/** The plan sheet as PDF, made by the worker. */
export function SheetPdf({ planId, version, paper }: { planId: string; version: number; paper: 'A4' | 'Letter' }) {
  return <MadeFile base={`/api/v1/plans/${planId}/sheets`} body={{ version, paper }} fileName={`plan-sheet-v${version}.pdf`} what={`PDF, ${paper}`} failed={FAILED} />;
}
