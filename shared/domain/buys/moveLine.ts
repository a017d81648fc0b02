import { apportion } from '../shares/apportion.ts';
import { explainStep } from '../shares/explainStep.ts';
import type {
  ChargeShare,
  MemberShare,
  ShareCharge,
  ShareRequest,
  ShareSheet,
} from '../shares/shareTypes.ts';

/** A share sheet after one member's line went to another, with what went along. */
export type MovedLine = {
  request: ShareRequest;
  sheet: ShareSheet;
  mg: number;
  /** The line's cost and its part of the charges: what the one pays less and the other more. */
  amountMinor: number;
};

type Part = { id: string; minor: number; taxMinor: number };

/** How much of a member's part of a charge the line causes, against all their lines: its weight and theirs. */
function weightsOf(charge: ShareCharge, member: MemberShare, lineId: string): [number, number] {
  const lines = member.lines.filter(
    (line) => line.mg > 0 && (charge.lineIds?.includes(line.lineId) ?? true),
  );
  const own = lines.find((line) => line.lineId === lineId);
  if (!own) return [0, 1];
  const rest = lines.filter((line) => line !== own);
  const sum = (of: (line: MemberShare['lines'][number]) => number) =>
    rest.reduce((total, line) => total + of(line), 0);
  switch (charge.basis) {
    case 'mass':
      return [own.mg, sum(({ mg }) => mg)];
    case 'value':
      return [own.costMinor, sum(({ costMinor }) => costMinor)];
    case 'portion':
      return [1, rest.length];
    case 'member':
      // Equal among members: it stays with whoever still receives something.
      return rest.length > 0 ? [0, 1] : [1, 0];
  }
}

function chargePart(charge: ShareCharge, member: MemberShare, lineId: string): Part {
  const share = member.charges.find(({ id }) => id === charge.id);
  const [own, rest] = weightsOf(charge, member, lineId);
  if (!share || own + rest === 0) return { id: charge.id, minor: 0, taxMinor: 0 };
  const [minor = 0] = apportion(share.minor, [own, rest]);
  const [taxMinor = 0] = apportion(share.taxMinor, [own, rest]);
  return { id: charge.id, minor, taxMinor };
}

function add(charges: readonly ChargeShare[], parts: readonly Part[], sign: 1 | -1): ChargeShare[] {
  return charges.map((charge) => {
    const part = parts.find(({ id }) => id === charge.id);
    if (!part) return charge;
    return {
      id: charge.id,
      minor: charge.minor + sign * part.minor,
      taxMinor: charge.taxMinor + sign * part.taxMinor,
    };
  });
}

function settled(member: Omit<MemberShare, 'totalMinor' | 'why'>, currency: string): MemberShare {
  const totalMinor =
    member.lines.reduce((sum, { costMinor }) => sum + costMinor, 0) +
    member.charges.reduce((sum, { minor }) => sum + minor, 0);
  const steps = [
    ...member.steps.filter(({ code }) => code !== 'total'),
    { code: 'total', values: { minor: totalMinor } },
  ];
  return { ...member, totalMinor, steps, why: steps.map((step) => explainStep(step, currency)) };
}

function moveRequest(
  request: ShareRequest,
  lineId: string,
  fromId: string,
  toId: string,
): ShareRequest {
  const onLine = (memberId: string) =>
    request.pledges.find((pledge) => pledge.lineId === lineId && pledge.memberId === memberId);
  const given = onLine(fromId);
  const held = onLine(toId);
  if (!given) return request;
  const upTo = (pledge: typeof given) => Math.max(pledge.wantedMg, pledge.upToMg ?? 0);
  const merged = held
    ? {
        ...held,
        wantedMg: held.wantedMg + given.wantedMg,
        at: held.at > given.at ? held.at : given.at,
        ...(held.upToMg !== undefined || given.upToMg !== undefined
          ? { upToMg: upTo(held) + upTo(given) }
          : {}),
      }
    : { ...given, memberId: toId };
  const rest = request.pledges.filter((pledge) => pledge !== given && pledge !== held);
  return { ...request, pledges: [...rest, merged] };
}

/**
 * Moves one line of a computed sheet from one member to another: the grams, their cost, and of each charge the part
 * that this line causes. Nobody else's share moves, and the sheet's total stays.
 * @returns null when the first member has no such line
 */
export function moveLine(
  request: ShareRequest,
  sheet: ShareSheet,
  lineId: string,
  fromId: string,
  toId: string,
): MovedLine | null {
  const from = sheet.members.find(({ memberId }) => memberId === fromId);
  const given = from?.lines.find((line) => line.lineId === lineId);
  if (!from || !given || fromId === toId) return null;
  const parts = request.charges.map((charge) => chargePart(charge, from, lineId));
  const amountMinor = given.costMinor + parts.reduce((sum, { minor }) => sum + minor, 0);
  const blank: MemberShare = {
    memberId: toId,
    lines: [],
    charges: from.charges.map(({ id }) => ({ id, minor: 0, taxMinor: 0 })),
    totalMinor: 0,
    steps: [],
    why: [],
  };
  const to = sheet.members.find(({ memberId }) => memberId === toId) ?? blank;
  const held = to.lines.find((line) => line.lineId === lineId);
  const joined = {
    lineId,
    mg: (held?.mg ?? 0) + given.mg,
    costMinor: (held?.costMinor ?? 0) + given.costMinor,
    taxMinor: (held?.taxMinor ?? 0) + given.taxMinor,
  };
  const said = (minor: number) => ({ code: 'handedOn', values: { lineId, mg: given.mg, minor } });
  const giver = settled(
    {
      ...from,
      lines: from.lines.filter((line) => line !== given),
      charges: add(from.charges, parts, -1),
      steps: [...from.steps, said(-amountMinor)],
    },
    request.currency,
  );
  const taker = settled(
    {
      ...to,
      lines: [...to.lines.filter((line) => line !== held), joined].sort((a, b) =>
        a.lineId < b.lineId ? -1 : 1,
      ),
      charges: add(to.charges, parts, 1),
      steps: [...to.steps, said(amountMinor)],
    },
    request.currency,
  );
  const others = sheet.members.filter(({ memberId }) => memberId !== toId);
  const members = others.map((member) => (member === from ? giver : member));
  const place = sheet.members.findIndex(({ memberId }) => memberId === toId);
  members.splice(place < 0 ? members.length : place, 0, taker);
  return {
    request: moveRequest(request, lineId, fromId, toId),
    sheet: { ...sheet, members },
    mg: given.mg,
    amountMinor,
  };
}
