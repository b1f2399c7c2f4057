import type { Reading } from '@/lib/domain/case/model';
import { QUANTITY_FACTS, type SizeQuantity } from '@/lib/domain/size-reading/quantities';
import type { SizeReading } from '@/lib/domain/size-reading/size-reading';

/** The newest reading of each quantity: readings are only ever added, so the last one written is what counts. */
export class NewestReadings {
  private readonly byQuantity = new Map<SizeQuantity, SizeReading>();

  constructor(readings: readonly SizeReading[]) {
    for (const reading of readings) {
      const known = this.byQuantity.get(reading.quantity);
      if (!known || reading.recordedAt > known.recordedAt) this.byQuantity.set(reading.quantity, reading);
    }
  }

  get(quantity: SizeQuantity): SizeReading | undefined {
    return this.byQuantity.get(quantity);
  }

  reading({ value, source, spread, takenOn }: SizeReading): Reading {
    return { value, source, takenOn, spread };
  }

  readingOr(quantity: SizeQuantity, otherwise: Reading): Reading {
    const found = this.get(quantity);
    return found ? this.reading(found) : otherwise;
  }

  label(reading: SizeReading): string {
    return QUANTITY_FACTS[reading.quantity].label;
  }
}
