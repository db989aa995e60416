export { InvitationScreen as default } from '@/features/accounts/invitation-screen';
