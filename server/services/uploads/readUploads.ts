import type { Upload, UploadList, UploadOwnerType } from '#shared/schemas/uploads.ts';
import { select, type Tx } from '../../config/database.ts';
import { fileStore } from '../../storage/fileStore.ts';
import type { ClubActor } from '../actors.ts';
import { DomainProblem, notFound } from '../problem.ts';
import { getUploadOwner, type UploadOwner } from './uploadOwners.ts';

/** An upload's row, with what only the server knows. */
export interface UploadRow extends Omit<Upload, 'addedAt'> {
  addedAt: Date;
  sha256: string;
  storageKey: string;
  deletedAt: Date | null;
}

const columns = `u.id, u.owner_type as "ownerType", u.owner_id as "ownerId", u.purpose, u.file_name as "fileName",
  u.content_type as "contentType", u.bytes, m.display_name as "addedBy", u.created_at as "addedAt", u.sha256,
  u.storage_key as "storageKey", u.deleted_at as "deletedAt"`;

/** An upload for the wire. */
export function presentUpload(row: UploadRow): Upload {
  const { id, ownerType, ownerId, purpose, fileName, contentType, bytes, addedBy, addedAt } = row;
  return {
    id,
    ownerType,
    ownerId,
    purpose,
    fileName,
    contentType,
    bytes,
    addedBy,
    addedAt: addedAt.toISOString(),
  };
}

/**
 * Uploads of one thing, the oldest first, and whether the actor may add to them.
 * @throws DomainProblem 404
 */
export async function listUploads(
  actor: ClubActor,
  ownerType: UploadOwnerType,
  ownerId: string,
): Promise<UploadList> {
  const owner = await getUploadOwner(actor, ownerType, ownerId);
  const rows = await select<UploadRow>(
    `select ${columns} from uploads u join memberships m on m.id = u.created_by_id
     where u.club_id = :clubId and u.owner_type = :ownerType and u.owner_id = :ownerId and u.deleted_at is null
     order by u.created_at, u.id`,
    { clubId: actor.club.id, ownerType, ownerId },
  );
  return { uploads: rows.map(presentUpload), may: { add: owner.mayAdd } };
}

/**
 * One upload that the actor may see, removed ones included, with its owner; inside a transaction under its lock.
 * @throws DomainProblem 404
 */
export async function getUpload(
  actor: ClubActor,
  id: string,
  tx?: Tx,
): Promise<{ row: UploadRow; owner: UploadOwner }> {
  const [row] = await select<UploadRow>(
    `select ${columns} from uploads u join memberships m on m.id = u.created_by_id
     where u.club_id = :clubId and u.id = :id ${tx ? 'for update of u' : ''}`,
    { clubId: actor.club.id, id },
    tx,
  );
  if (!row) throw notFound('This file');
  return { row, owner: await getUploadOwner(actor, row.ownerType, row.ownerId, tx) };
}

/**
 * The bytes of an upload.
 * @throws DomainProblem 404, also when it was removed; 503 when the store has lost it
 */
export async function readUpload(
  actor: ClubActor,
  id: string,
): Promise<{ row: UploadRow; bytes: Buffer }> {
  const { row } = await getUpload(actor, id);
  if (row.deletedAt) throw notFound('This file');
  const bytes = await fileStore().get(row.storageKey);
  if (!bytes) {
    throw new DomainProblem(503, 'unavailable', 'This file can’t be had now. Try again later.');
  }
  return { row, bytes };
}
