export { MyTicketsScreen as default } from '@/features/bookings/my-tickets-screen';
