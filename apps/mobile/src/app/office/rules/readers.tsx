export { RuleReadersScreen as default } from '@/features/rules/readers-screen';
