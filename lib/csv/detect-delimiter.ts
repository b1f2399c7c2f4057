import { CsvReader, type Delimiter } from './csv-reader';

const DELIMITERS: readonly Delimiter[] = [',', ';', '\t'];
const ROWS_LOOKED_AT = 20;

/**
 * The sign that cuts the first lines into the same number of fields most often, and into more than one. A decimal
 * comma makes commas many but uneven, so evenness counts before number. A comma when nothing tells.
 */
export function detectDelimiter(start: string): Delimiter {
  let best: Delimiter = ',';
  let bestScore = 0;
  for (const delimiter of DELIMITERS) {
    const score = evenness(start, delimiter);
    if (score > bestScore) [best, bestScore] = [delimiter, score];
  }
  return best;
}

function evenness(start: string, delimiter: Delimiter): number {
  let counts: number[];
  try {
    const reader = new CsvReader(delimiter);
    counts = reader.push(start).slice(0, ROWS_LOOKED_AT).map(({ fields }) => fields.length);
    if (counts.length === 0) counts = reader.end().map(({ fields }) => fields.length);
  } catch {
    return 0;
  }
  const width = counts[0] ?? 0;
  if (width < 2) return 0;
  return counts.filter((count) => count === width).length / counts.length + width / 1000;
}
