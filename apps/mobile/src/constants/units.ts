import type { Units } from '@mereward/shared/accounts/contract';
import { USUAL_SPACING_M } from '@mereward/shared/units/wraps';

/** Metres, and the usual distance sticks, until the reader says otherwise. */
export const USUAL_UNITS: Units = { length: 'm', stickSpacingM: USUAL_SPACING_M };
