export { LevelScreen as default } from '@/features/surveys/level-screen';
