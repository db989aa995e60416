export { ChoiceScreen as default } from '@/features/bookings/choice-screen';
