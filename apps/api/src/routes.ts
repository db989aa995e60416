import { accountRoutes } from './accounts/routes';
import { bookingRoutes } from './bookings/routes';
import { fisheryRoutes } from './fisheries/routes';
import type { Route } from './http/route';
import { lakeRoutes } from './lakes/routes';

/** Every route of the API, word by word. */
export const routes: readonly Route[] = [...accountRoutes, ...fisheryRoutes, ...lakeRoutes, ...bookingRoutes];
