import type {
  ArrivalBody,
  BagBody,
  CloseBagBody,
  CutBody,
  SpillBody,
  VoidBody,
  WeighingBody,
} from '#shared/schemas/splits.ts';
import * as splits from 'src/api/splits.ts';
import type { BuyAt } from 'src/api/splits.ts';
import { useBuysStore } from 'src/stores/buys.ts';
import { useSplitsStore } from 'src/stores/splits.ts';

/** Everything that is done in the split of one buy; each act is in the stores when its promise resolves. */
export function splitActs(where: BuyAt) {
  const store = useSplitsStore();
  const buys = useBuysStore();
  const terms = () => buys.headOf(where.buy)?.termsVersion ?? 0;
  const { act, move } = store;
  return {
    recordArrival: (supplier: string, body: ArrivalBody) =>
      act(splits.postArrival(where, supplier, body)),
    countBag: (bag: string, body: BagBody) => act(splits.putBag(where, bag, body)),
    arrive: () => move(where, splits.postArrive(where, terms())),
    applyTargets: async (basis: string) => {
      await move(where, splits.postTargets(where, { termsVersion: terms(), basis }));
      await store.loadTargets(where);
    },
    start: () => move(where, splits.postStart(where, terms())),
    claim: (portion: string, station: string) => act(splits.postClaim(where, portion, station)),
    release: (portion: string) => act(splits.postRelease(where, portion)),
    cut: (portion: string, body: CutBody) => act(splits.postCut(where, portion, body)),
    join: (portion: string, version: number) => act(splits.postJoin(where, portion, version)),
    takeOut: (portion: string, body: VoidBody) => act(splits.postVoid(where, portion, body)),
    putBack: (portion: string, version: number) =>
      act(splits.postRestorePortion(where, portion, version)),
    weigh: (body: WeighingBody) => act(splits.postWeighing(where, body)),
    undoWeighing: (weighing: string) => act(splits.postUndoWeighing(where, weighing)),
    spill: (bag: string, body: SpillBody) => act(splits.postSpill(where, bag, body)),
    undoSpill: (spill: string) => act(splits.postUndoSpill(where, spill)),
    closeBag: (bag: string, body: CloseBagBody) => act(splits.postCloseBag(where, bag, body)),
    reopenBag: (bag: string, version: number) => act(splits.postReopenBag(where, bag, version)),
    noteLine: (line: string, note: string) => act(splits.putLineNote(where, line, note)),
    takeExcess: async (takes: boolean) => {
      await move(where, splits.putExcess(where, takes));
      await store.loadFinal(where);
    },
    finish: (basis: string) =>
      move(where, splits.postFinish(where, { termsVersion: terms(), basis })),
  };
}

export type SplitActs = ReturnType<typeof splitActs>;
