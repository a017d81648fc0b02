import { supplierOfShipping } from '#shared/domain/buys/boughtPacks.ts';
import type { ShareSheet, ShareStep } from '#shared/domain/shares/shareTypes.ts';
import type { MyShare } from '#shared/schemas/splits.ts';
import { select } from '../../config/database.ts';
import type { BuyActor } from '../actors.ts';
import { loadPledges, loadSheetTerms } from '../buys/loadSheetTerms.ts';
import { findSnapshot } from './computeTargets.ts';
import { finalOf } from './finalOf.ts';
import { findBags, findPortions } from './splitRows.ts';

type Member = ShareSheet['members'][number];

const moneySteps = new Set(['lineCost', 'lineTax']);

function whyOf(member: Member | undefined, test: (step: ShareStep) => boolean): string[] {
  return member ? member.why.filter((_text, index) => test(member.steps[index] as ShareStep)) : [];
}

const memberIn = (sheet: ShareSheet | undefined, id: string) =>
  sheet?.members.find(({ memberId }) => memberId === id);

/** The newest targets that hold this member's line: later ones leave out what was weighed already. */
async function findTargetSheets(buyId: string): Promise<ShareSheet[]> {
  const rows = await select<{ sheet: ShareSheet }>(
    `select sheet from snapshots where buy_id = :buyId and kind = 'targets' order by created_at desc`,
    { buyId },
  );
  return rows.map(({ sheet }) => sheet);
}

async function chargeNames(
  buyId: string,
  known: Readonly<Record<string, string>>,
  suppliers: readonly { id: string; name: string }[],
) {
  const rows = await select<{ id: string; name: string }>(
    'select id, name from charges where buy_id = :buyId',
    { buyId },
  );
  const names = new Map(rows.map(({ id, name }) => [id, name]));
  return (id: string) => {
    const supplier = suppliers.find((each) => each.id === supplierOfShipping(id));
    return supplier ? `Shipping, ${supplier.name}` : (known[id] ?? names.get(id) ?? 'Charge');
  };
}

/** The reader's own share of a buy through its stages, each figure with its arithmetic. */
export async function readMyShare(actor: BuyActor): Promise<MyShare> {
  const { id: buyId } = actor.buy;
  const me = actor.membershipId;
  const terms = await loadSheetTerms(buyId);
  const pledges = (await loadPledges(buyId)).filter(({ membershipId }) => membershipId === me);
  const portions = (await findPortions(buyId)).filter(
    ({ membership_id, state }) => membership_id === me && state !== 'void',
  );
  const lots = new Map((await findBags(buyId)).map(({ id, lot }) => [id, lot]));
  const told = await findSnapshot(buyId, ['estimate', 'ordered']);
  const targets = await findTargetSheets(buyId);
  const final = await finalOf(buyId);
  const [own] = await select<{ locked: number | null; final: number | null; on: string | null }>(
    `select m.locked_minor as locked, m.final_minor as final,
        (b.pickup_at at time zone c.time_zone)::date as on
     from buys b join clubs c on c.id = b.club_id
     left join buy_members m on m.buy_id = b.id and m.membership_id = :me where b.id = :buyId`,
    { buyId, me },
  );
  const estimate = memberIn(told?.sheet, me);
  const finals = memberIn(final?.sheet, me);
  const paying = finals ?? estimate;
  const nameOf = await chargeNames(buyId, final?.extra.names ?? {}, terms.suppliers);
  const sumOf = (rows: readonly (number | null)[]) =>
    rows.reduce((total: number, mg) => total + (mg ?? 0), 0);

  const lines = terms.lines.flatMap((line): MyShare['lines'] => {
    const mine = portions.filter(({ line_id }) => line_id === line.id);
    const pledge = pledges.find(({ lineId }) => lineId === line.id);
    const estimated = estimate?.lines.find(({ lineId }) => lineId === line.id);
    if (mine.length === 0 && !pledge && !estimated) return [];
    const target = targets
      .map((sheet) => memberIn(sheet, me))
      .find((member) => member?.lines.some(({ lineId }) => lineId === line.id));
    const done = mine.length > 0 && mine.every(({ state }) => state === 'done');
    const cost = paying?.lines.find(({ lineId }) => lineId === line.id);
    const isOfLine = (step: ShareStep) => step.values['lineId'] === line.id;
    return [
      {
        lineId: line.id,
        name: line.salt.name,
        formula: line.salt.formula,
        wantedMg: pledge?.wantedMg ?? 0,
        estimateMg: estimated?.mg ?? 0,
        targetMg: targets.length === 0 ? null : sumOf(mine.map(({ target_mg }) => target_mg)),
        weighedMg: done ? sumOf(mine.map(({ weighed_mg }) => weighed_mg)) : null,
        chargedMg: done ? sumOf(mine.map(({ charged_mg }) => charged_mg)) : null,
        portions: mine.map((portion) => ({
          code: portion.code,
          part: portion.part,
          parts: portion.parts,
          targetMg: portion.target_mg,
          state: portion.state,
          weighedMg: portion.weighed_mg,
          lot: lots.get(portion.bag_id ?? '') ?? '',
          handedOver: portion.handed_over_at !== null,
        })),
        cost: cost
          ? {
              label: line.salt.name,
              minor: cost.costMinor,
              why: whyOf(paying, (step) => isOfLine(step) && moneySteps.has(step.code)),
            }
          : null,
        why: whyOf(target ?? estimate, (step) => isOfLine(step) && !moneySteps.has(step.code)),
      },
    ];
  });
  const weighed = portions.length > 0 && portions.every(({ state }) => state === 'done');
  return {
    stage: final ? 'final' : weighed ? 'weighed' : targets.length > 0 ? 'targets' : 'estimate',
    lines,
    charges: (paying?.charges ?? [])
      .filter(({ minor }) => minor !== 0)
      .map(({ id, minor }) => ({
        label: nameOf(id),
        minor,
        why: whyOf(paying, (step) => step.values['chargeId'] === id),
      })),
    estimateMinor: own?.locked ?? null,
    finalMinor: own?.final ?? null,
    lostMinor: final?.extra.lost.find(({ memberId }) => memberId === me)?.minor ?? 0,
    finalOn: final ? (own?.on ?? null) : null,
  };
}
