import { assess, foldProbability, rankRemedies, roundAssessment } from '@/lib/physics';
import { drawCase } from '@/tests/support/draw-case';

/** 53 bits of a text: two 32-bit streams of multiply and xor, whole numbers only, so alike in every browser. */
function hashOf(text: string): number {
  let a = 0xdeadbeef;
  let b = 0x41c6ce57;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    a = Math.imul(a ^ code, 2654435761);
    b = Math.imul(b ^ code, 1597334677);
  }
  return 4294967296 * (2097151 & (b >>> 0)) + (a >>> 0);
}

/** Every 25th seeded case is ranked as well, every 250th asked for its probability. */
export function answerText(seed: number): string {
  const given = drawCase(seed);
  const answers: unknown[] = [assess(given)];
  if (seed % 25 === 0) answers.push(rankRemedies(given));
  if (seed % 250 === 0) {
    const { extents } = given.patient;
    const unsure = {
      ...extents,
      anterior: { ...extents.anterior, spread: 8 },
      left: { ...extents.left, spread: 10 },
    };
    answers.push(foldProbability({ ...given, patient: { ...given.patient, extents: unsure } }));
  }
  return JSON.stringify(roundAssessment(answers));
}

/** Hashes of the rounded answers of seeds from … to − 1. */
export function answerHashes(from: number, to: number): number[] {
  return Array.from({ length: to - from }, (_, i) => hashOf(answerText(from + i)));
}
