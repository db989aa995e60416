import type { Route } from './http/route';

/** Every route of the API, word by word. */
export const routes: readonly Route[] = [];
