import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { ScannerForm } from '@/components/scanner/scanner-form';
import { PageBody, PageHeader } from '@/components/ui/page';
import { requireActor } from '@/lib/auth/current-actor';
import { mayAttempt } from '@/lib/domain/access';
import { addScanner } from '../actions';

export const metadata: Metadata = { title: 'Add a scanner' };

export default async function NewScannerPage() {
  if (!mayAttempt(await requireActor(), 'scanner.edit')) notFound();
  return (
    <PageBody>
      <PageHeader
        title="Add a scanner"
        lead="Take the figures from the scanner’s own papers. Every one can be changed later; each change is kept as a version."
        back={{ href: '/site/scanners', label: 'Scanners' }}
      />
      <ScannerForm save={addScanner} mayEdit />
    </PageBody>
  );
}
