export { BookingsOfDayScreen as default } from '@/features/bookings/bookings-of-day-screen';
