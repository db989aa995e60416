export { MakeFisheryScreen as default } from '@/features/fisheries/make-fishery-screen';
