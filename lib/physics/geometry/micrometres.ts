/**
 * Millimetres as whole micrometres. Every grid decision (lines, partitions, verdict, order) compares these, because
 * transcendental functions differ in the last bits between a browser and the server.
 * The tiny bias keeps values that are exact half micrometres (a pixel of 300/256 mm makes them) on one side of the tie.
 */
export function toMicrometres(mm: number): number {
  return Math.floor(mm * 1000 + 0.5 + 1e-5);
}

/** A length rounded to 1 µm, back in mm. */
export function roundToMicrometre(mm: number): number {
  return toMicrometres(mm) / 1000;
}
