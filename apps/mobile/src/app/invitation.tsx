export { InvitationScreen as default } from '@/features/fisheries/invitation-screen';
