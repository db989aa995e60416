export { PegTicketsScreen as default } from '@/features/bookings/peg-tickets-screen';
