import type { Figures } from '../types';
import { valuesBehind } from './evaluate';
import type { Model } from './model';
import { isInUse } from './values';

/** The sentences of the order of making that are said at this size, `[[formula]]` and all. */
export function orderOf(model: Model, figures: Figures): readonly string[] {
  const values = valuesBehind(figures)?.cut;
  return model.order.flatMap((line) => (!values || isInUse(line, values) ? [line.says] : []));
}
