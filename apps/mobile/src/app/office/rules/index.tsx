export { OfficeRulesScreen as default } from '@/features/rules/office-rules-screen';
