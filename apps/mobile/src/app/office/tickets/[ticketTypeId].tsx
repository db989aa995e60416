export { TicketTypeScreen as default } from '@/features/tickets/ticket-type-screen';
