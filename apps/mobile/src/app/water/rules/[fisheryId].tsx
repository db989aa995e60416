export { FisheryRulesScreen as default } from '@/features/rules/fishery-rules-screen';
