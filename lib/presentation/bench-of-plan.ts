/** Where a plan is edited: its booking's bench, or one of its own. */
export function benchOfPlan({ id, bookingId }: { readonly id: string; readonly bookingId: string | null }): string {
  return bookingId === null ? `/plans/${id}/bench` : `/bench/${bookingId}`;
}
