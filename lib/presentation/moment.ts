/** A moment as every site reads it: day and minute, in UTC and saying so, because a log must not depend on the reader. */
export function momentText(moment: Date): string {
  return `${moment.toISOString().slice(0, 16).replace('T', ' ')} UTC`;
}

/** The day alone, in UTC. */
export function dayText(moment: Date): string {
  return moment.toISOString().slice(0, 10);
}
