export { BundleError, MAX_BUNDLE_ENTRIES, readBundle, type BundleBooking, type BundleContent } from './read-bundle';
export { matchBookings, type BundleMatching } from './match-bookings';
