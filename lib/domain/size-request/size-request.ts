/** Open until it is answered, cancelled or too old; the address is of use, and kept, only that long. */
export type SizeRequestStatus = 'open' | 'answered' | 'cancelled' | 'expired';

export interface SizeRequestRecord {
  readonly siteId: string;
  readonly id: string;
  readonly bookingId: string;
  readonly status: SizeRequestStatus;
  /** Sealed; '' where none was typed or it is erased. */
  readonly addressSealed: string;
  readonly addressMasked: string;
  readonly expiresAt: Date;
  readonly askedAt: Date;
  readonly sentCount: number;
  readonly lastSentAt: Date | null;
  readonly settledAt: Date | null;
}

/** Long enough for someone who has to find a tape and a helper. */
export const REQUEST_DAYS = 14;

/** An address as lists may show it: enough to notice a wrong one, not enough to write to. */
export function maskAddress(address: string): string {
  const at = address.lastIndexOf('@');
  const [name, host] = [address.slice(0, at), address.slice(at + 1)];
  const ending = host.slice(host.lastIndexOf('.'));
  return `${name.slice(0, 1)}…@${host.slice(0, 1)}…${ending.length < host.length ? ending : ''}`;
}
