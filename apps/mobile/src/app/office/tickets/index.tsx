export { TicketTypesScreen as default } from '@/features/tickets/ticket-types-screen';
