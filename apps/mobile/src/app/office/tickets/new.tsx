export { NewTicketTypeScreen as default } from '@/features/tickets/new-ticket-type-screen';
