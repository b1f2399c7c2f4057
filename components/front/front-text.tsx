import { LinkButton } from '@/components/ui/button';

const PARTS = [
  {
    title: 'Works out the fold',
    text: 'from the patient’s size and the prescription: where each outlying piece is, where it lands, how deep, how sure.',
  },
  {
    title: 'Ranks every remedy by what it costs',
    text: 'in time, breath-hold, SNR, voxel and effort, including the ones that buy the time back.',
  },
  {
    title: 'Carries the chosen plan',
    text: 'to the scan room as one printed page, in the form that scanner takes it.',
  },
];

/** What the product does, in the words of its job. */
export function FrontText({ entry }: { entry: { href: string; label: string } }) {
  return (
    <div>
      <h1 className="text-3xl">
        What will wrap around, and the cheapest way to keep it out of the part that matters
      </h1>
      <p className="mt-5 max-w-prose text-lg text-ink-soft">
        A radiographer about to scan a large-habitus abdomen has to choose a field of view, a phase direction
        and an oversampling that keep tissue outside the picture from folding onto the organ under question,
        inside one breath-hold, on a scanner whose opening and table the patient must fit.
      </p>
      <dl className="mt-8 divide-y divide-line border-y border-line">
        {PARTS.map((part) => (
          <div key={part.title} className="py-3">
            <dt className="font-semibold">{part.title}</dt>
            <dd className="text-ink-soft">{part.text}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-8 flex flex-wrap gap-3">
        <LinkButton href={entry.href} variant="primary">
          {entry.label}
        </LinkButton>
        <LinkButton href="#quick-check">Try the quick check</LinkButton>
      </p>
      <p className="mt-3 max-w-prose text-ink-soft">
        The quick check is on this page: four fields and an answer, without an account.
      </p>
      <p className="mt-6 max-w-prose text-sm text-ink-soft">
        Planning aid. Trained staff, implant screening, equipment labelling and local policy decide. Licensed
        practice prevails.
      </p>
    </div>
  );
}
