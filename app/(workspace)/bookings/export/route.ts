import { tableQuery, type TableSearch } from '@/components/booking/table-query';
import { handleRoute } from '@/lib/http/handle-route';
import { exportBookings } from '@/lib/services/pre-check/list-booking-table';

/** The bookings of the address as a file. */
export const GET = handleRoute({}, async ({ context, request }) => {
  const { ids, ...search } = Object.fromEntries(new URL(request.url).searchParams) as TableSearch & { ids?: string };
  const { after: _page, ...filter } = tableQuery(search, new Date());
  const csv = await exportBookings(context, { filter, ...(ids ? { ids: ids.split(',') } : {}) });
  return new Response(csv, {
    headers: {
      'content-type': 'text/csv; charset=utf-8',
      'content-disposition': `attachment; filename="bookings-${filter.from}-to-${filter.to}.csv"`,
      'cache-control': 'no-store',
    },
  });
});
