import {
  ImportBody,
  ImportDone,
  ImportPreview,
  ImportPreviewBody,
} from '#shared/schemas/offerImport.ts';
import { SupplierParams } from '#shared/schemas/suppliers.ts';
import { clubRoute, FileReply, type RouteDef } from '../middlewares/route.ts';
import { canEditSuppliers, canReadSalts } from '../policies/salts.ts';
import { exportOffers, importTemplate } from '../services/suppliers/import/exportOffers.ts';
import { importOffers, previewImport } from '../services/suppliers/import/importOffers.ts';

const one = '/suppliers/:supplier';

export const offerImportRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/suppliers/import-template.csv',
    summary: 'A table to fill in for an import of offers',
    allow: canReadSalts,
    reply: 'file',
    run: () =>
      Promise.resolve(
        new FileReply('text/csv', importTemplate(), { fileName: 'offers template.csv' }),
      ),
  }),
  clubRoute({
    method: 'get',
    path: `${one}/offers.csv`,
    summary: 'A supplier’s offers as CSV',
    allow: canReadSalts,
    params: SupplierParams,
    reply: 'file',
    run: async ({ actor, params }) => {
      const { fileName, csv } = await exportOffers(actor, params.supplier);
      return new FileReply('text/csv', csv, { fileName });
    },
  }),
  clubRoute({
    method: 'post',
    path: `${one}/import/preview`,
    summary: 'What an import of offers from CSV would do; nothing is saved',
    allow: canEditSuppliers,
    params: SupplierParams,
    takesFile: true,
    body: ImportPreviewBody,
    reply: ImportPreview,
    run: ({ actor, params, body, file }) => previewImport(actor, params.supplier, body.rules, file),
  }),
  clubRoute({
    method: 'post',
    path: `${one}/import`,
    summary: 'Import offers from CSV as previewed, all or nothing',
    allow: canEditSuppliers,
    params: SupplierParams,
    takesFile: true,
    body: ImportBody,
    reply: ImportDone,
    run: ({ actor, params, body, file }) => importOffers(actor, params.supplier, body, file),
  }),
];
