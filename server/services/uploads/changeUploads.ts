import { createHash, randomBytes } from 'node:crypto';
import type { Upload, UploadBody } from '#shared/schemas/uploads.ts';
import { execute, select, transact } from '../../config/database.ts';
import { fileStore } from '../../storage/fileStore.ts';
import type { ClubActor } from '../actors.ts';
import { writeAudit } from '../audit/writeAudit.ts';
import { byActor } from '../buys/withBuy.ts';
import { forbidden, invalid } from '../problem.ts';
import { cleanFile } from './cleanFile.ts';
import { getUpload, presentUpload } from './readUploads.ts';
import { getUploadOwner } from './uploadOwners.ts';

const mostFiles = 40;

/**
 * Keeps a file beside its owner. The bytes are durable before the row is, so that no row points to nothing.
 * @throws DomainProblem 404 for an owner the actor can't see; 403; 415 for a type not taken; 422
 */
export async function addUpload(
  actor: ClubActor,
  body: UploadBody,
  file: { fileName: string; bytes: Buffer } | undefined,
): Promise<Upload> {
  const owner = await getUploadOwner(actor, body.ownerType, body.ownerId);
  if (!owner.mayAdd) throw forbidden();
  if (!file || file.bytes.length === 0) throw invalid({ file: 'Choose a file that isn’t empty.' });
  const clean = await cleanFile(file);
  const storageKey = randomBytes(20).toString('hex');
  await fileStore().put(storageKey, clean.bytes, clean.contentType);
  try {
    return await transact(async (tx) => {
      await select(
        'select pg_advisory_xact_lock(hashtextextended(:ownerId, 0))',
        { ownerId: body.ownerId },
        tx,
      );
      const [count] = await select<{ files: number }>(
        'select count(*)::int as files from uploads where owner_type = :ownerType and owner_id = :ownerId and deleted_at is null',
        { ownerType: body.ownerType, ownerId: body.ownerId },
        tx,
      );
      if ((count?.files ?? 0) >= mostFiles) {
        throw invalid({ file: `There are ${mostFiles} files already. Remove one first.` });
      }
      const [row] = await select<{ id: string }>(
        `insert into uploads (club_id, owner_type, owner_id, purpose, file_name, content_type, bytes, sha256,
            storage_key, created_by_id)
         values (:clubId, :ownerType, :ownerId, :purpose, :fileName, :contentType, :bytes, :sha256, :storageKey, :byId)
         returning id`,
        {
          ...body,
          clubId: actor.club.id,
          fileName: clean.fileName,
          contentType: clean.contentType,
          bytes: clean.bytes.length,
          sha256: createHash('sha256').update(clean.bytes).digest('hex'),
          storageKey,
          byId: actor.membershipId,
        },
        tx,
      );
      const id = row?.id ?? '';
      await writeAudit(tx, {
        clubId: actor.club.id,
        ...(owner.buyId ? { buyId: owner.buyId } : {}),
        by: byActor(actor),
        action: 'uploads.add',
        subject: { type: body.ownerType, id: body.ownerId },
        after: { upload: id, fileName: clean.fileName, purpose: body.purpose },
      });
      return presentUpload((await getUpload(actor, id, tx)).row);
    });
  } catch (error) {
    await fileStore().remove(storageKey);
    throw error;
  }
}

/**
 * Removes a file from sight, or brings it back; the bytes stay. A repeat changes nothing.
 * @throws DomainProblem 404; 403
 */
export async function removeUpload(
  actor: ClubActor,
  id: string,
  removed: boolean,
): Promise<Upload> {
  return transact(async (tx) => {
    const { row, owner } = await getUpload(actor, id, tx);
    if (!owner.mayAdd) throw forbidden();
    if ((row.deletedAt !== null) !== removed) {
      await execute(
        'update uploads set deleted_at = case when :removed then clock_timestamp() end where id = :id',
        { id, removed },
        tx,
      );
      await writeAudit(tx, {
        clubId: actor.club.id,
        ...(owner.buyId ? { buyId: owner.buyId } : {}),
        by: byActor(actor),
        action: removed ? 'uploads.remove' : 'uploads.restore',
        subject: { type: row.ownerType, id: row.ownerId },
        after: { upload: id, fileName: row.fileName },
      });
    }
    return presentUpload(row);
  });
}
