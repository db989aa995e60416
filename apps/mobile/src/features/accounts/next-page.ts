import { useLocalSearchParams, type Href } from 'expo-router';

/** One value of the address's query, or nothing. */
export function useQueryText(name: string): string {
  const value = useLocalSearchParams()[name];
  return typeof value === 'string' ? value : '';
}

/** Only a page of ours: a link from elsewhere must not use our sign-in to send somebody to a page that looks like it. */
export const ownPage = (wished: string): Href =>
  /^\/(?![/\\])[\w\-/?=&%.~]*$/.test(wished) ? (wished as `/${string}`) : '/water';

/** Where to go once signed in. */
export const useNextPage = (): Href => ownPage(useQueryText('next'));
