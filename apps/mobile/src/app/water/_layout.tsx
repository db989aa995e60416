export { Slot as default } from 'expo-router';
