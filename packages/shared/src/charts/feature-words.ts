import type { ChartFeature } from './chart-answers';

type Sized = Pick<ChartFeature, 'kind' | 'lengthM' | 'widthM' | 'depthM' | 'reliefM' | 'certain'>;

/** "Bar 2: 34 m long, 9 m wide, top at 1.4 m, 1.1 m above what lies round it". */
export function featureWords(name: string, feature: Sized): string {
  const { kind, lengthM, widthM, depthM, reliefM, certain } = feature;
  const size = `${lengthM.toFixed(0)} m long, ${widthM.toFixed(0)} m wide`;
  const at = { bar: 'top', shelf: 'lying', gully: 'deepest', hole: 'deepest' }[kind];
  const by = {
    bar: 'above what lies round it',
    shelf: 'above the foot of its edge',
    gully: 'below what lies beside it',
    hole: 'below what lies round it',
  }[kind];
  const doubt = certain ? '' : '; not sure: the casts here could miss by as much';
  return `${name}: ${size}, ${at} at ${depthM.toFixed(1)} m, ${reliefM.toFixed(1)} m ${by}${doubt}`;
}

export const FEATURE_METHOD =
  'Looked for in the charted depths, with and without the fall from the shore that the whole lake shares: bars fall away and gullies rise on both sides within 20 m (wide ones 36 m), holes rise all round, ' +
  'shelves are gentle ground near the shore that ends in a steep edge. Each is drawn at half its height. Certain: it stands ' +
  'out by more than 1.96 σ of the two depths. Depths are at chart datum. Common practice, no published source.';
