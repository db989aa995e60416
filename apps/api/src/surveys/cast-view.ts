import type { SurveyCast } from '@mereward/db/entities/surveys/survey-cast';
import type { CastView } from '@mereward/shared/surveys/contract';

export const castView = (cast: SurveyCast): CastView => ({
  id: cast.id,
  visitId: cast.visitId,
  pegId: cast.pegId,
  seq: cast.seq,
  lineId: cast.lineId,
  observedAt: cast.observedAt.toISOString(),
  observation: cast.observation,
  reduced: cast.reduced,
});
