import type { Upload, UploadList, UploadPurpose } from '#shared/schemas/uploads.ts';
import { defineStore } from 'pinia';
import { ref } from 'vue';
import * as api from 'src/api/uploads.ts';

export type { UploadOwner } from 'src/api/uploads.ts';
type Owner = api.UploadOwner;

const keyOf = ({ ownerType, ownerId }: Owner) => `${ownerType}:${ownerId}`;

/** Files beside the things that were looked at. */
export const useUploadsStore = defineStore('uploads', () => {
  const lists = ref<Record<string, UploadList>>({});

  const listOf = (owner: Owner): UploadList | null => lists.value[keyOf(owner)] ?? null;

  async function load(club: string, owner: Owner) {
    lists.value[keyOf(owner)] = await api.getUploads(club, owner);
  }

  function put(upload: Upload, present: boolean) {
    const list = lists.value[keyOf(upload)];
    if (!list) return;
    const others = list.uploads.filter(({ id }) => id !== upload.id);
    const uploads = present ? [...others, upload] : others;
    uploads.sort((a, b) => (a.addedAt < b.addedAt ? -1 : 1));
    lists.value[keyOf(upload)] = { ...list, uploads };
  }

  async function add(club: string, owner: Owner, purpose: UploadPurpose, file: File) {
    put(await api.postUpload(club, owner, purpose, file), true);
  }

  async function remove(club: string, upload: Upload) {
    put(await api.deleteUpload(club, upload.id), false);
  }

  async function restore(club: string, upload: Upload) {
    put(await api.postUploadRestore(club, upload.id), true);
  }

  return { listOf, load, add, remove, restore, urlOf: api.uploadUrl };
});
