import type { SheetSums, SumsGround } from '#shared/domain/buys/sheetSums.ts';
import type { SheetPlan } from '#shared/schemas/sheet.ts';
import { shallowRef } from 'vue';
import { makeSums } from 'src/workers/sumsThread.ts';

const BUDGET_MS = 400;

const inOrder = (packs: Record<string, number>) => JSON.stringify(Object.entries(packs).sort());

/** What the sums are made of right now; `settled`: nothing is still being saved. */
export type SheetGround = SumsGround & {
  version: number;
  settled: boolean;
  plan: SheetPlan | null;
};

/**
 * The sheet's sums, made anew after each change, and with the server's plan in place of the page's own once it comes.
 * @param differs told when both planned the same version exactly and chose other packs
 */
export function makeSheetSums(
  ground: () => SheetGround | null,
  differs: (defect: { sheetVersion: number; mine: string; server: string }) => void,
) {
  const sums = shallowRef<SheetSums | null>(null);
  let asked = 0;
  let soon = false;
  let own: { version: number; packs: string } | null = null;

  async function compute() {
    const now = ground();
    if (!now) return;
    asked += 1;
    const turn = asked;
    const { version, settled, plan, ...request } = now;
    const known = settled && plan?.forVersion === version ? plan.plan : null;
    const made = await makeSums({ ...request, known, budgetMs: BUDGET_MS });
    if (turn !== asked) return;
    sums.value = made;
    if (!known && settled && made.plan.exact && !made.overridden) {
      own = { version, packs: inOrder(made.plan.packs) };
    }
  }

  /** Once for any number of changes in one go. */
  function refresh() {
    if (soon) return;
    soon = true;
    void Promise.resolve()
      .then(() => {
        soon = false;
        return compute();
      })
      // The last sums stay until the next change.
      .catch(() => undefined);
  }

  function compare({ forVersion, plan }: SheetPlan) {
    const server = inOrder(plan.packs);
    if (own?.version === forVersion && plan.exact && own.packs !== server) {
      differs({ sheetVersion: forVersion, mine: own.packs, server });
    }
    own = null;
  }

  const clear = () => {
    sums.value = null;
    own = null;
  };

  return { sums, refresh, compare, clear };
}
