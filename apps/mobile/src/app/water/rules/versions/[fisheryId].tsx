export { RuleVersionsScreen as default } from '@/features/rules/versions-screen';
