export { ByCodeScreen as default } from '@/features/bookings/by-code-screen';
