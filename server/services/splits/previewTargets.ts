import { bagCountsMg } from '#shared/domain/splits/bagSums.ts';
import { targetWords } from '#shared/domain/splits/targetWords.ts';
import type { TargetsPreview } from '#shared/schemas/splits.ts';
import { select } from '../../config/database.ts';
import { Buy } from '../../models/Buy.ts';
import { presentBag } from '../../presenters/splits.ts';
import type { BuyActor } from '../actors.ts';
import { wrongState } from '../problem.ts';
import { computeTargets, type ComputedTargets } from './computeTargets.ts';

type Line = TargetsPreview['lines'][number];

const sum = (values: readonly number[]) => values.reduce((total, value) => total + value, 0);

function previewLine(
  computed: ComputedTargets,
  line: ComputedTargets['terms']['lines'][number],
  names: ReadonlyMap<string, string>,
  targetsMade: boolean,
  locale: string,
): Line {
  const { pledges, targets, portions, told } = computed;
  const own = targets.filter(({ lineId }) => lineId === line.id);
  const members = own.map(({ membershipId, targetMg, kept }) => {
    const pledge = pledges.find((p) => p.lineId === line.id && p.membershipId === membershipId);
    const estimate = told.sheet.members
      .find(({ memberId }) => memberId === membershipId)
      ?.lines.find(({ lineId }) => lineId === line.id);
    const standing = portions.filter(
      (portion) =>
        portion.line_id === line.id &&
        portion.membership_id === membershipId &&
        portion.state !== 'void',
    );
    return {
      member: { membershipId, name: names.get(membershipId) ?? '' },
      wantedMg: pledge?.wantedMg ?? 0,
      estimateMg: estimate?.mg ?? 0,
      standingMg: targetsMade ? sum(standing.map(({ target_mg }) => target_mg)) : null,
      targetMg,
      kept,
    };
  });
  const countedMg = sum(
    computed.bags
      .map(presentBag)
      .filter(({ lineId }) => lineId === line.id)
      .map(bagCountsMg),
  );
  const wantedMg = sum(members.map((member) => member.wantedMg));
  const targetMg = sum(members.map((member) => member.targetMg));
  const outcome = {
    countedMg,
    wantedMg,
    targetMg,
    shortage: line.shortage,
    surplus: line.surplus,
    less: members.filter((member) => member.targetMg < member.wantedMg).length,
    more: members.filter((member) => member.targetMg > member.wantedMg).length,
  };
  return {
    lineId: line.id,
    name: line.salt.name,
    boughtMg: told.request.lines.find(({ id }) => id === line.id)?.availableMg ?? 0,
    countedMg,
    wantedMg,
    targetMg,
    shelfMg: Math.max(0, countedMg - targetMg),
    text: targetWords(outcome, locale),
    members: members.sort((a, b) => a.member.name.localeCompare(b.member.name)),
  };
}

/** The targets that the bags would give now, beside what the members were told, before anything is changed. */
export async function previewTargets(actor: BuyActor): Promise<TargetsPreview> {
  const { state } = actor.buy;
  if (state !== 'arrived' && state !== 'splitting') {
    throw wrongState(`Targets are made once the packs have arrived; the buy is ${state}.`);
  }
  const buy = await Buy.findByPk(actor.buy.id, { rejectOnEmpty: true });
  const computed = await computeTargets(buy);
  const people = await select<{ id: string; name: string }>(
    'select id, display_name as name from memberships where club_id = :clubId',
    { clubId: actor.club.id },
  );
  const names = new Map(people.map(({ id, name }) => [id, name]));
  return {
    basis: computed.basis,
    standing: computed.standing,
    blocked: computed.blocked,
    lines: computed.terms.lines.map((line) =>
      previewLine(computed, line, names, buy.targetVersion > 0, actor.club.locale),
    ),
  };
}
