import { standingThread } from '../jobs/standing-thread';
import type { SheetPaper } from './sheet-paper';

/** Draws the rules beside the server: three hundred of them in large print take a while. */
export const drawRulesPaper = standingThread<SheetPaper>('rules/sheet');
