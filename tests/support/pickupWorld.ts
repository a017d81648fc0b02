import type { Bag } from '#shared/schemas/splits.ts';
import { closeBag } from '#server/services/splits/closeBag.ts';
import { finishSplitting } from '#server/services/splits/finishSplitting.ts';
import { keepWeighing } from '#server/services/splits/keepWeighing.ts';
import { previewFinal } from '#server/services/splits/previewFinal.ts';
import type { LockedWorld } from './locked.ts';
import { actorFor, makeSplitWorld, splitOf, weighingOf } from './splitWorld.ts';

/** A world whose shares are weighed and posted: everything on target, what is left on the shelf. */
export async function makePickupWorld(netMg?: (bag: Bag) => number): Promise<LockedWorld> {
  const world = await makeSplitWorld(netMg);
  const own = await actorFor(world, world.people.own);
  const split = await splitOf(world);
  for (const portion of split.portions) await keepWeighing(own, weighingOf(split, portion));
  for (const bag of (await splitOf(world)).bags) {
    await closeBag(own, bag.id, {
      version: bag.version,
      shelfMg: (bag.netMg ?? 0) - bag.portionsMg,
      tareMg: null,
      unaccountedNote: '',
    });
  }
  const { basis } = await previewFinal(own);
  await world.buy.reload();
  await finishSplitting(own, { termsVersion: world.buy.termsVersion, basis });
  await world.buy.reload();
  return world;
}
