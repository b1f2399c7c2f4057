import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { rankRemedies, roundAssessment } from '@/lib/physics';
import { ABDOMEN_PROTOCOL, prescriptionOf, sketchCase } from '@/tests/support/physics-cases';

/**
 * Answers for the five sequences of an abdomen, as they stood when they were last looked at by hand. A change here is a
 * change of answers: it is either an error or a new engine version. SELVEDGE_WRITE_GOLDEN=1 writes them anew.
 */
const FOLDER = path.join(import.meta.dirname, '../../../fixtures/golden/abdomen');

describe('golden answers', () => {
  it.each(ABDOMEN_PROTOCOL)('%s', (family) => {
    const { now, remedies, notPossible, candidates } = rankRemedies(
      sketchCase({ prescription: prescriptionOf(family) }),
    );
    const answer = roundAssessment({
      now: { ...now, slab: now.slab && { ...now.slab, partitions: now.slab.partitions.length } },
      remedies: remedies.map(({ assessment, prescription, ...remedy }) => ({
        ...remedy,
        acquiredLines: prescription.acquiredLines,
        fovPhaseMm: prescription.fovPhaseMm,
        averages: prescription.averages,
        verdict: assessment.verdict,
        time: assessment.time,
      })),
      notPossible,
      candidates,
    });
    const file = path.join(FOLDER, `${family}.json`);
    const text = `${JSON.stringify(answer, null, 2)}\n`;
    if (process.env.SELVEDGE_WRITE_GOLDEN === '1') {
      mkdirSync(FOLDER, { recursive: true });
      writeFileSync(file, text);
    }
    expect(existsSync(file), `${file} is missing`).toBe(true);
    expect(JSON.parse(text)).toEqual(JSON.parse(readFileSync(file, 'utf8')));
  });
});
