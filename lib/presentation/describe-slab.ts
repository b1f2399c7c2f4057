import type { PartitionResult, SlabResult } from '@/lib/physics/model/assessment';

/** Numbers as people list them: "1–9 and 56–64". */
export function partitionRanges(partitions: readonly PartitionResult[]): string {
  const ranges: [number, number][] = [];
  for (const { index } of partitions) {
    const last = ranges.at(-1);
    if (last && last[1] === index - 1) last[1] = index;
    else ranges.push([index, index]);
  }
  return ranges.map(([from, to]) => (from === to ? `${from + 1}` : `${from + 1}–${to + 1}`)).join(' and ');
}

/** The slab in words: what wraps, what is dim or bright, and what would be enough. */
export function describeSlab(slab: SlabResult): readonly string[] {
  const of = (wanted: (partition: PartitionResult) => boolean) => slab.partitions.filter(wanted);
  const contaminated = of(({ state }) => state === 'contaminated');
  const dim = of((partition) => partition.dim);
  const bright = of((partition) => partition.bright);
  const lines: string[] = [];
  lines.push(
    contaminated.length === 0
      ? 'No partition holds tissue from the other end of the slab.'
      : `Partitions ${partitionRanges(contaminated)} hold tissue from the other end of the slab; ${slab.contaminatedInKeepClear === 0 ? 'none' : slab.contaminatedInKeepClear} of them in the keep-clear area.`,
  );
  if (slab.smallestCleanPartitions !== undefined && slab.contaminated > 0) {
    lines.push(`${slab.smallestCleanPartitions} acquired partitions keep the keep-clear area free of it.`);
  }
  if (dim.length > 0) lines.push(`Dim, not wrapped: partitions ${partitionRanges(dim)}.`);
  if (bright.length > 0) lines.push(`Bright, not wrapped: partitions ${partitionRanges(bright)}.`);
  return lines;
}
