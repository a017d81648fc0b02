import type {
  Upload,
  UploadList,
  UploadOwnerType,
  UploadPurpose,
} from '#shared/schemas/uploads.ts';
import { api, apiUrl } from 'src/api/http.ts';

/** The thing that files are beside. */
export type UploadOwner = { ownerType: UploadOwnerType; ownerId: string };

const at = (club: string, upload?: string) =>
  `/clubs/${club}/uploads${upload === undefined ? '' : `/${upload}`}`;

export const getUploads = (club: string, owner: UploadOwner) =>
  api.get<UploadList>(at(club), owner);

export function postUpload(club: string, owner: UploadOwner, purpose: UploadPurpose, file: File) {
  const form = new FormData();
  form.set('ownerType', owner.ownerType);
  form.set('ownerId', owner.ownerId);
  form.set('purpose', purpose);
  form.set('file', file);
  return api.post<Upload>(at(club), form);
}

export const deleteUpload = (club: string, upload: string) => api.del<Upload>(at(club, upload));

export const postUploadRestore = (club: string, upload: string) =>
  api.post<Upload>(`${at(club, upload)}/restore`);

/** Where a file is to be seen, or with `download` to be kept. */
export const uploadUrl = (club: string, upload: string, download = false) =>
  apiUrl(`${at(club, upload)}/file`, download ? { download: '1' } : {});
