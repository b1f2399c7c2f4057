import { readFileSync } from 'node:fs';

/** Splits one CSV line; double quotes protect commas, a doubled quote stands for itself. */
function splitLine(line: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (let i = 0; i < line.length; i += 1) {
    const character = line[i]!;
    if (quoted) {
      if (character !== '"') cell += character;
      else if (line[i + 1] === '"') {
        cell += '"';
        i += 1;
      } else quoted = false;
    } else if (character === '"') quoted = true;
    else if (character === ',') {
      cells.push(cell);
      cell = '';
    } else cell += character;
  }
  cells.push(cell);
  return cells;
}

export interface PublishedRow {
  text(column: string): string;
  number(column: string): number;
}

/** Rows of a CSV text with a head line; a missing column or a cell that is no number fails the test. */
export function parseRows(name: string, csv: string): readonly PublishedRow[] {
  const [head, ...lines] = csv.trim().split(/\r?\n/).map(splitLine);
  return lines.map((cells) => {
    const text = (column: string): string => {
      const cell = cells[head!.indexOf(column)];
      if (cell === undefined) throw new Error(`${name}: no column ${column}`);
      return cell;
    };
    return {
      text,
      number: (column) => {
        const value = Number(text(column));
        if (text(column) === '' || Number.isNaN(value))
          throw new Error(`${name}: ${column} is "${text(column)}"`);
        return value;
      },
    };
  });
}

/** Rows of fixtures/published/<key>/values.csv. */
export function readPublished(key: string): readonly PublishedRow[] {
  const file = new URL(`../../fixtures/published/${key}/values.csv`, import.meta.url);
  return parseRows(key, readFileSync(file, 'utf8'));
}
