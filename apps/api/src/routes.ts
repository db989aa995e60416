import { accountRoutes } from './accounts/routes';
import { bankRoutes } from './bookings/bank-routes';
import { boardRoutes } from './bookings/board-routes';
import { lifeRoutes } from './bookings/life-routes';
import { closureDeedRoutes } from './bookings/closure-routes';
import { moneyRoutes } from './bookings/money-routes';
import { bookingRoutes } from './bookings/routes';
import { ticketPaperRoutes } from './bookings/ticket-routes';
import { termsRoutes } from './bookings/terms-routes';
import { disagreementRoutes } from './charts/disagreement-routes';
import { paperRoutes } from './charts/papers/paper-routes';
import { leftOutRoutes } from './charts/left-out-routes';
import { chartRoutes } from './charts/routes';
import { tellingRoutes } from './charts/telling-routes';
import { fisheryRoutes } from './fisheries/routes';
import { fileRoutes } from './files/routes';
import { calendarRoutes } from './bookings/calendar-routes';
import { waitingRoutes } from './bookings/waiting-routes';
import type { Route } from './http/route';
import { pictureRoutes } from './lakes/picture-routes';
import { photoRoutes } from './lakes/photo-routes';
import { lakeRoutes } from './lakes/routes';
import { waterRoutes } from './lakes/water-routes';
import { closureRoutes } from './closures/routes';
import { noticeRoutes } from './notices/routes';
import { rulePaperRoutes } from './rules/paper-routes';
import { paymentRoutes } from './payments/routes';
import { ruleRoutes } from './rules/routes';
import { bottomRoutes } from './surveys/bottom-routes';
import { logRoutes } from './surveys/log-routes';
import { surveyRoutes } from './surveys/routes';
import { ticketRoutes } from './tickets/routes';

/** Every route of the API, word by word. */
export const routes: readonly Route[] = [
  ...accountRoutes,
  ...fisheryRoutes,
  ...lakeRoutes,
  ...waterRoutes,
  ...photoRoutes,
  ...pictureRoutes,
  ...fileRoutes,
  ...ruleRoutes,
  ...rulePaperRoutes,
  ...closureRoutes,
  ...noticeRoutes,
  ...closureDeedRoutes,
  ...ticketRoutes,
  ...termsRoutes,
  ...bookingRoutes,
  ...moneyRoutes,
  ...paymentRoutes,
  ...boardRoutes,
  ...waitingRoutes,
  ...calendarRoutes,
  ...lifeRoutes,
  ...ticketPaperRoutes,
  ...bankRoutes,
  ...surveyRoutes,
  ...bottomRoutes,
  ...logRoutes,
  ...chartRoutes,
  ...leftOutRoutes,
  ...paperRoutes,
  ...tellingRoutes,
  ...disagreementRoutes,
];
