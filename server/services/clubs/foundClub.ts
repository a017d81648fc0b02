import type { FoundClubBody } from '#shared/schemas/clubs.ts';
import { isUniqueViolation, transact } from '../../config/database.ts';
import { Club } from '../../models/Club.ts';
import { Membership } from '../../models/Membership.ts';
import type { AccountActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { invalid } from '../problem.ts';

/**
 * A new club; its founder is organiser, treasurer and steward.
 * @throws DomainProblem 422 at `slug` when another club has that address
 */
export async function foundClub(
  actor: AccountActor,
  body: FoundClubBody,
): Promise<{ slug: string }> {
  const { displayName, ...fields } = body;
  try {
    return await transact(async (tx) => {
      const club = await Club.create(fields, { transaction: tx.transaction });
      const founder = await Membership.create(
        {
          clubId: club.id,
          accountId: actor.accountId,
          displayName,
          isOrganiser: true,
          isTreasurer: true,
          isSteward: true,
        },
        { transaction: tx.transaction },
      );
      await writeAudit(tx, {
        clubId: club.id,
        by: { membershipId: founder.id, name: displayName, requestId: actor.requestId },
        action: 'clubs.found',
        subject: { type: 'club', id: club.id },
        after: fields,
      });
      return { slug: club.slug };
    });
  } catch (error) {
    if (!isUniqueViolation(error)) throw error;
    throw invalid({ slug: 'Another club has this address. Choose another.' });
  }
}
