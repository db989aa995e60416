export { MineScreen as default } from '@/features/bookings/mine-screen';
