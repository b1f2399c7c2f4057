import { DomainError, type BodyRegion, type Reading } from '@/lib/domain/case/model';
import type { NewestReadings } from '@/lib/domain/size-reading/newest-readings';
import type { SizeQuantity } from '@/lib/domain/size-reading/quantities';
import { isEstimate, type Estimate, type SizeAnswer } from '@/lib/physics/size/size-types';
import { workOutSize, type KnownSizes } from '@/lib/physics/size/work-out-size';

/** Whole breadth and depth worked out from what else is known, mm; absent where there is no route. */
export interface DerivedSizes {
  readonly breadth?: Reading;
  readonly depth?: Reading;
  readonly remarks: readonly string[];
}

function inMm(newest: NewestReadings, quantity: SizeQuantity): Reading | undefined {
  const found = newest.get(quantity);
  if (!found) return undefined;
  const reading = newest.reading(found);
  return quantity.endsWith('-cm') ? { ...reading, value: reading.value * 10, spread: reading.spread * 10 } : reading;
}

function asRead(newest: NewestReadings, quantity: SizeQuantity): Reading | undefined {
  const found = newest.get(quantity);
  return found && newest.reading(found);
}

function knownSizes(newest: NewestReadings): KnownSizes {
  const sex = newest.get('sex')?.value;
  return {
    ...(sex === 1 ? { sex: 'female' } : sex === 2 ? { sex: 'male' } : {}),
    weightKg: asRead(newest, 'weight-kg'),
    heightCm: asRead(newest, 'height-cm'),
    girthMm: inMm(newest, 'girth-cm'),
    depthMm: inMm(newest, 'depth-mm'),
    breadthMm: inMm(newest, 'breadth-mm'),
    hipGirthMm: inMm(newest, 'hip-girth-cm'),
  };
}

/** Whole millimetres: a regression knows no tenth, and a typed value then compares equal. */
const toReading = ({ value, spread, source, takenOn }: Estimate): Reading => ({
  value: Math.round(value),
  spread: Math.round(spread),
  source,
  ...(takenOn === undefined ? {} : { takenOn }),
});

const sentence = (words: string): string => `${words.charAt(0).toUpperCase()}${words.slice(1)}.`;

function remarksOn(answer: SizeAnswer): string[] {
  return isEstimate(answer) ? [sentence(answer.words), ...answer.cautions] : [answer.words];
}

/** In the pelvis the hips are the widest part, so the larger of trunk and hips counts. */
function breadthIn(region: BodyRegion, trunk: SizeAnswer, hips: SizeAnswer): SizeAnswer {
  if (region !== 'pelvis' || !isEstimate(hips)) return trunk;
  return isEstimate(trunk) && trunk.value >= hips.value ? trunk : hips;
}

/** Sizes nobody measured, by the best route from girth, or weight and height; the words say how. */
export function deriveSizes(newest: NewestReadings, region: BodyRegion): DerivedSizes {
  try {
    const worked = workOutSize(knownSizes(newest), {
      level: region === 'abdomen' ? 'liver' : 'iliac-crest',
      allowPopulation: false,
    });
    const breadth = breadthIn(region, worked.breadth, worked.hipBreadth);
    return {
      ...(isEstimate(breadth) ? { breadth: toReading(breadth) } : {}),
      ...(isEstimate(worked.depth) ? { depth: toReading(worked.depth) } : {}),
      remarks: [...new Set([...remarksOn(breadth), ...remarksOn(worked.depth)])],
    };
  } catch (error) {
    if (error instanceof DomainError) return { remarks: [`No size can be worked out: ${error.message}.`] };
    throw error;
  }
}
