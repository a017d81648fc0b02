import { z } from 'zod';
import {
  Upload,
  UploadBody,
  UploadList,
  UploadParams,
  UploadQuery,
} from '#shared/schemas/uploads.ts';
import { limit } from '../middlewares/limits.ts';
import { clubRoute, FileReply, type RouteDef } from '../middlewares/route.ts';
import { canAskForUploads } from '../policies/uploads.ts';
import { addUpload, removeUpload } from '../services/uploads/changeUploads.ts';
import { listUploads, readUpload } from '../services/uploads/readUploads.ts';

const one = '/uploads/:upload';

/** What a browser may do with a file somebody uploaded: show an image, keep the rest, run nothing. */
const safeHeaders = {
  'Content-Security-Policy': "default-src 'none'; sandbox",
  'X-Content-Type-Options': 'nosniff',
};

/**
 * Files beside things. Who may see or add depends on the thing (policies/uploads.ts), which is looked up first: what
 * the actor can't see is 404, what they see but may not add to 403.
 */
export const uploadsRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/uploads',
    summary: 'Files of an offer, a supplier, a bag, a bill and the like',
    allow: canAskForUploads,
    former: true,
    query: UploadQuery,
    reply: UploadList,
    run: ({ actor, query }) => listUploads(actor, query.ownerType, query.ownerId),
  }),
  clubRoute({
    method: 'post',
    path: '/uploads',
    summary: 'Add a file: JPEG, PNG, WebP, PDF or CSV, at most 10 MB',
    allow: canAskForUploads,
    before: [
      limit({
        name: 'uploads',
        windowMs: 15 * 60_000,
        max: 200,
        key: (req) => req.user?.id ?? req.ip ?? '',
      }),
    ],
    takesFile: true,
    body: UploadBody,
    reply: Upload,
    status: 201,
    run: ({ actor, body, file }) => addUpload(actor, body, file),
  }),
  clubRoute({
    method: 'get',
    path: `${one}/file`,
    summary: 'A file itself: images to look at, others to keep',
    allow: canAskForUploads,
    former: true,
    params: UploadParams,
    query: z.object({ download: z.literal('1').optional() }),
    reply: 'file',
    run: async ({ actor, params, query }) => {
      const { row, bytes } = await readUpload(actor, params.upload);
      const shown = row.contentType.startsWith('image/') && query.download === undefined;
      return new FileReply(row.contentType, bytes, {
        fileName: row.fileName,
        disposition: shown ? 'inline' : 'attachment',
        etag: `"${row.sha256}"`,
        headers: safeHeaders,
      });
    },
  }),
  clubRoute({
    method: 'delete',
    path: one,
    summary: 'Remove a file; it can be brought back',
    allow: canAskForUploads,
    params: UploadParams,
    reply: Upload,
    run: ({ actor, params }) => removeUpload(actor, params.upload, true),
  }),
  clubRoute({
    method: 'post',
    path: `${one}/restore`,
    summary: 'Bring a removed file back',
    allow: canAskForUploads,
    params: UploadParams,
    reply: Upload,
    run: ({ actor, params }) => removeUpload(actor, params.upload, false),
  }),
];
