export { BookingScreen as default } from '@/features/bookings/booking-screen';
