export { BookForSomebodyScreen as default } from '@/features/bookings/book-for-somebody-screen';
