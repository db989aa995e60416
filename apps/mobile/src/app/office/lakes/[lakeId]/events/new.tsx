export { NewEventScreen as default } from '@/features/charts/new-event-screen';
