export { FindPegScreen as default } from '@/features/bookings/find-peg-screen';
