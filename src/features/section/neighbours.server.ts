import type { Tx } from '@/db/client';
import type { NeighbourPair, Neighbours } from './page';
import { type NeighbourRows, nextInDepth, nextInSeries } from './register/neighbours';
import { registerOf } from './register/read.server';
import { itemsAt } from './search.server';
import type { SectionItem } from './section';

/** The sections next to one in its series and in its depth, of the issued editions. */
export async function findNeighbours(tx: Tx, practiceId: string, item: SectionItem): Promise<Neighbours> {
  const register = await registerOf(tx, practiceId);
  const [series, depth] = [nextInSeries(register, item), nextInDepth(register, item)];
  const at = [series, depth].flatMap(({ lighter, heavier }) => [lighter, heavier]);
  const items = await itemsAt(
    tx,
    register,
    practiceId,
    at.filter((row) => row !== null),
  );
  const pair = ({ lighter, heavier }: NeighbourRows): NeighbourPair => ({
    lighter: items.get(lighter ?? -1) ?? null,
    heavier: items.get(heavier ?? -1) ?? null,
  });
  return { series: pair(series), depth: pair(depth) };
}
