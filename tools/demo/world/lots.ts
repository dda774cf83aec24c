import { drawsFor } from './random';
import { modelOf } from './scatter';
import type { DemoLot, DemoShift } from './types';

const TWO_HOURS = 7200;

/** Number of a lot, counted through the line's lots since the first shift of the six weeks; `lot` from 1. */
export function lotNumberOf(line: string, shiftIndex: number, lot: number): string {
  const { firstLotNumber, lotsPerShift } = modelOf(line).line;
  return String(firstLotNumber + shiftIndex * lotsPerShift + lot - 1);
}

/** The lots of a line in a shift, in time order, each beginning where the one before ends. */
export function lotsOf(seed: number, line: string, shift: DemoShift): DemoLot[] {
  const { line: details, campaign, quantityPerLot } = modelOf(line);
  const product = details.products[Number(campaign[shift.index % campaign.length])];
  const length = (shift.endsAt - shift.startsAt) / details.lotsPerShift;
  return Array.from({ length: details.lotsPerShift }, (_, position) => {
    const number = lotNumberOf(line, shift.index, position + 1);
    const factor = 1 + 0.05 * (2 * drawsFor(`${seed}/${line}/quantity/${number}`).uniform() - 1);
    return {
      number,
      line,
      product: product.code,
      quantity: 10 * Math.round((quantityPerLot * factor * length) / TWO_HOURS / 10),
      quantityUnit: product.quantityUnit,
      startsAt: shift.startsAt + position * length,
      endsAt: shift.startsAt + (position + 1) * length,
    };
  });
}
