export { OfficeBookingScreen as default } from '@/features/bookings/office-booking-screen';
