import { Badge } from '@/components/ui/badge';
import { Figure } from '@/components/ui/figure';
import { Notice } from '@/components/ui/notice';
import { Table, Td, Th, Tr } from '@/components/ui/table';
import { QUANTITY_FACTS } from '@/lib/domain/size-reading/quantities';
import { TAPE_SITE_LABELS } from '@/lib/domain/size-reading/tape-site';
import { isMeasured, SOURCE_WORDS } from '@/lib/presentation/anatomy-words';
import { formatDate } from '@/lib/presentation/moment';
import type { SizeReadingView, SizeRecordView } from '@/lib/schemas/size-reading';
import { CODED } from './coded-quantities';

/** Two facts are kept as numbers; people read the words. */
function ReadingValue({ reading }: { reading: SizeReadingView }) {
  const word = CODED[reading.quantity]?.find((option) => option.value === String(reading.value))?.label;
  if (word) return <>{word}</>;
  return (
    <Figure
      value={reading.spread > 0 ? `${reading.value} ± ${reading.spread}` : reading.value}
      unit={QUANTITY_FACTS[reading.quantity].unit}
    />
  );
}

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}

/** A girth says where its tape went when that is known. */
const sizeName = ({ quantity, tapeSite }: SizeReadingView): string =>
  quantity === 'girth-cm' && tapeSite ? `girth ${TAPE_SITE_LABELS[tapeSite]}` : QUANTITY_FACTS[quantity].label.replace(/ \(.*\)$/, '');

/** Every reading with how it was got, when, and its spread; newest first. Dotted: not measured. */
export function SizeRecord({ record }: { record: SizeRecordView }) {
  return (
    <div className="space-y-4">
      {record.missing.length > 0 && (
        <Notice title="Sizes needed before anything can be worked out">
          <ul className="list-disc pl-5">
            {record.missing.map((text) => (
              <li key={text}>{capital(text)}</li>
            ))}
          </ul>
        </Notice>
      )}
      {record.remarks.length > 0 && (
        <Notice title="About these sizes">
          <ul className="list-disc pl-5">
            {record.remarks.map((text) => (
              <li key={text}>{text}</li>
            ))}
          </ul>
        </Notice>
      )}
      {record.readings.length > 0 && (
        <Table caption="Readings">
          <thead>
            <tr>
              <Th>Size</Th>
              <Th className="text-right">Value</Th>
              <Th>How got</Th>
              <Th>When</Th>
            </tr>
          </thead>
          <tbody>
            {record.readings.map((reading) => (
              <Tr key={reading.id}>
                <Td>{capital(sizeName(reading))}</Td>
                <Td className="text-right">
                  <ReadingValue reading={reading} />
                </Td>
                <Td>
                  <Badge edge={isMeasured(reading.source) ? 'solid' : 'dotted'} className="whitespace-normal">
                    {SOURCE_WORDS[reading.source]}
                  </Badge>
                </Td>
                <Td className="whitespace-nowrap">
                  {formatDate(new Date(`${reading.takenOn}T12:00:00`))}
                  {reading.expired && <span className="text-ink-soft"> · expired</span>}
                </Td>
              </Tr>
            ))}
          </tbody>
        </Table>
      )}
    </div>
  );
}
