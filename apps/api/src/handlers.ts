import { expireHoldJob } from './bookings/jobs';
import { tellTomorrowJob, warnHoldJob } from './bookings/tell-ahead';
import { ticketEnclosed } from './bookings/ticket-files';
import { settleChoicesJob } from './bookings/settle-choices';
import { closePageJob } from './bookings/payment-jobs';
import { buildChartJob } from './charts/jobs';
import { removeFiles, resizePhoto } from './files/jobs';
import type { Handlers } from './jobs/worker';
import { resizeLakePicture } from './lakes/picture-jobs';
import { sendMail } from './mail/jobs';
import { askRefund } from './payments/refund-jobs';
import { readLogJob } from './surveys/log-jobs';

/** What does each kind of queued job, word by word. */
export const handlers: Handlers = {
  'booking.expire': expireHoldJob,
  'closure.settle': settleChoicesJob,
  'booking.warn': warnHoldJob,
  'booking.eve': tellTomorrowJob,
  'mail.send': sendMail(({ source, config }, { id }) =>
    ticketEnclosed({ tx: source.manager, publicUrl: config.publicUrl }, id),
  ),
  'chart.build': buildChartJob,
  'photo.resize': resizePhoto,
  'log.read': readLogJob,
  'files.remove': removeFiles,
  'picture.resize': resizeLakePicture,
  'refund.ask': askRefund,
  'payment.close': closePageJob,
};
