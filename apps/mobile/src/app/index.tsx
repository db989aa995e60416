import { Redirect } from 'expo-router';

/** The water is everyone's front door. */
export default function FrontDoor() {
  return <Redirect href="/water" />;
}
