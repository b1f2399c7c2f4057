import { Button } from '@/components/ui/button';

const control = 'figures h-10 rounded border border-line-strong bg-paper px-3';

/** Which days are listed: a plain form, so the choice is in the address. */
export function DayRange({ from, to }: { from: string; to: string }) {
  return (
    <form method="get" action="/bookings" className="flex flex-wrap items-end gap-3">
      <label className="text-sm font-semibold">
        <span className="mb-1 block">From</span>
        <input type="date" name="from" defaultValue={from} required className={control} />
      </label>
      <label className="text-sm font-semibold">
        <span className="mb-1 block">To</span>
        <input type="date" name="to" defaultValue={to} required className={control} />
      </label>
      <Button type="submit">Show these days</Button>
    </form>
  );
}
