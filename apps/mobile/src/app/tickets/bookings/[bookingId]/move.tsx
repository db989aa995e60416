export { MoveScreen as default } from '@/features/bookings/move-screen';
