import { paymentReference } from '#shared/domain/buys/paymentReference.ts';
import { supplierOfShipping } from '#shared/domain/buys/boughtPacks.ts';
import type { SheetTerms } from '#shared/domain/buys/sheetTerms.ts';
import type { MemberShare, ShareSheet } from '#shared/domain/shares/shareTypes.ts';
import type { Tx } from '../../config/database.ts';
import type { NoticeContent } from '../../mail/renderNotice.ts';
import type { Buy } from '../../models/Buy.ts';
import { owedOfBuy } from '../ledger/owed.ts';
import { queueNotice } from '../notices/queueNotice.ts';
import { clubOfBuy, type ClubWords } from './clubOfBuy.ts';
import type { PreparedLock } from './prepareLock.ts';

function chargeName(id: string, terms: SheetTerms): string {
  const supplierId = supplierOfShipping(id);
  if (supplierId === null)
    return terms.charges.find((charge) => charge.id === id)?.name ?? 'Charge';
  return `Shipping, ${terms.suppliers.find((supplier) => supplier.id === supplierId)?.name ?? ''}`;
}

function shareRows(
  share: MemberShare,
  terms: SheetTerms,
  club: ClubWords,
): (readonly [string, string])[] {
  const { say } = club;
  const names = new Map(terms.lines.map(({ id, salt }) => [id, salt.name]));
  return [
    ...share.lines
      .filter(({ mg }) => mg > 0)
      .map(
        (line) =>
          [
            names.get(line.lineId) ?? '',
            `${say.mass(line.mg)}, ${say.money(line.costMinor)}`,
          ] as const,
      ),
    ...share.charges
      .filter(({ minor }) => minor !== 0)
      .map(({ id, minor }) => [chargeName(id, terms), say.money(minor)] as const),
    ['In total', say.money(share.totalMinor)],
  ];
}

function day(at: Date | null, { locale, timeZone }: ClubWords): string {
  if (!at) return '';
  return new Intl.DateTimeFormat(locale, {
    weekday: 'long',
    day: 'numeric',
    month: 'long',
    timeZone,
  }).format(at);
}

/** Tells everyone in a locked buy what they get, what is due until when, and how to pay it. */
export async function tellLocked(
  buy: Buy,
  { terms, sheet }: PreparedLock & { sheet: ShareSheet },
  tx: Tx,
): Promise<void> {
  const club = await clubOfBuy(buy.clubId, tx);
  const owed = await owedOfBuy(buy.id, tx);
  const shares = new Map(sheet.members.map((share) => [share.memberId, share]));
  const to = [...new Set([...shares.keys(), ...owed.keys()])];

  const content = (membershipId: string): NoticeContent => {
    const share = shares.get(membershipId);
    const { paidMinor = 0, openMinor = 0 } = owed.get(membershipId) ?? {};
    const due = openMinor > 0;
    const rows: (readonly [string, string])[] = share ? shareRows(share, terms, club) : [];
    if (paidMinor > 0) rows.push(['Paid so far', club.say.money(paidMinor)]);
    if (due) {
      rows.push(['To pay now', club.say.money(openMinor)]);
      rows.push(['Reference', paymentReference(buy.id, membershipId)]);
    }
    return {
      subject: due
        ? `${buy.name} is locked: ${club.say.money(openMinor)} due`
        : `${buy.name} is locked: nothing to pay`,
      paragraphs: [
        share
          ? `${buy.name} is locked, so pledges stand. This is your share as it is expected.`
          : `${buy.name} is locked, and you have no part in it any more. What you paid is your credit.`,
        ...(due
          ? [
              `Please pay ${club.say.money(openMinor)} by ${day(buy.dueAt, club)}, with the reference below.`,
              ...(club.transferHow ? [club.transferHow] : []),
            ]
          : []),
      ],
      rows,
      action: { label: 'See your share', path: `/c/${club.slug}/buys/${buy.id}/locked` },
    };
  };
  await queueNotice(tx, {
    clubId: buy.clubId,
    buyId: buy.id,
    kind: 'locked',
    eventKey: `buy:${buy.id}:locked:${buy.termsVersion}`,
    to,
    content,
  });
}
