export { LettingTermsScreen as default } from '@/features/bookings/letting-terms-screen';
