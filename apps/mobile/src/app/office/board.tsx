export { BoardScreen as default } from '@/features/bookings/board-screen';
