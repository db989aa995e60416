export { FisheryScreen as default } from '@/features/fisheries/fishery-screen';
