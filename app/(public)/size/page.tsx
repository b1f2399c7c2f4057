import type { Metadata } from 'next';
import { SizePage } from '@/components/size-request/size-page';
import { answerAction, openFormAction, reopenFormAction } from './actions';

/** The title names nobody's business: it stays in the history of whoever's phone this is. */
export const metadata: Metadata = { title: { absolute: 'Measurements' }, referrer: 'no-referrer', robots: { index: false, follow: false } };

export default function SizeRequestPage() {
  return <SizePage open={openFormAction} reopen={reopenFormAction} answer={answerAction} />;
}
