import { handleRoute } from '@/lib/http/handle-route';
import { idParams } from '@/lib/schemas/fields/ids';
import { getBooking } from '@/lib/services/booking/get-booking';

export const GET = handleRoute({ params: idParams }, async ({ context, params }) => getBooking(context, params));
