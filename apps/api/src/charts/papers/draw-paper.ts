import { standingThread } from '../../jobs/standing-thread';
import type { PaperGiven } from './paper.worker';

/** Draws a paper beside the server: up to a second's work, which nobody else's answer should wait for. */
export const drawPaper = standingThread<PaperGiven>('charts/papers/paper');
