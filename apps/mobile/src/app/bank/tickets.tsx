export { BankTicketsScreen as default } from '@/features/bookings/bank-tickets-screen';
