import { CastScreen } from '@/features/surveys/cast-screen';
import { NextCastsPart } from './next-casts-part';

/** The next cast of a visit, with what the chart says of where to cast next from the peg one stands on. */
export function CastNextScreen() {
  return <CastScreen suggest={(terms) => <NextCastsPart key={terms.pegId} {...terms} />} />;
}
