import { VersionBody } from '#shared/schemas/salts.ts';
import {
  Offer,
  OfferBody,
  OfferChange,
  OfferParams,
  OfferPrices,
  Supplier,
  SupplierBody,
  SupplierChange,
  SupplierList,
  SupplierPage,
  SupplierParams,
} from '#shared/schemas/suppliers.ts';
import { clubRoute, type RouteDef } from '../middlewares/route.ts';
import { canEditSuppliers, canReadSalts } from '../policies/salts.ts';
import { addOffer, archiveOffer, changeOffer } from '../services/suppliers/changeOffer.ts';
import {
  addSupplier,
  archiveSupplier,
  changeSupplier,
} from '../services/suppliers/changeSupplier.ts';
import {
  getSupplier,
  listOfferPrices,
  listOffers,
  listSuppliers,
} from '../services/suppliers/readSuppliers.ts';

const one = '/suppliers/:supplier';
const offer = `${one}/offers/:offer`;

export const suppliersRoutes: RouteDef[] = [
  clubRoute({
    method: 'get',
    path: '/suppliers',
    summary: 'The club’s suppliers',
    allow: canReadSalts,
    reply: SupplierList,
    run: async ({ actor }) => ({
      suppliers: await listSuppliers(actor.club.id),
      may: { edit: canEditSuppliers(actor) },
    }),
  }),
  clubRoute({
    method: 'post',
    path: '/suppliers',
    summary: 'Add a supplier',
    allow: canEditSuppliers,
    body: SupplierBody,
    reply: Supplier,
    status: 201,
    run: ({ actor, body }) => addSupplier(actor, body),
  }),
  clubRoute({
    method: 'get',
    path: one,
    summary: 'A supplier and its offers',
    allow: canReadSalts,
    params: SupplierParams,
    reply: SupplierPage,
    run: async ({ actor, params }) => {
      const supplier = await getSupplier(actor.club.id, params.supplier);
      const offers = await listOffers(actor.club.id, params.supplier);
      return { supplier, offers, may: { edit: canEditSuppliers(actor) && !supplier.isShelf } };
    },
  }),
  clubRoute({
    method: 'put',
    path: one,
    summary: 'Change a supplier',
    allow: canEditSuppliers,
    params: SupplierParams,
    body: SupplierChange,
    reply: Supplier,
    run: ({ actor, params, body: { version, ...fields } }) =>
      changeSupplier(actor, params.supplier, version, fields),
  }),
  clubRoute({
    method: 'post',
    path: `${one}/archive`,
    summary: 'Archive a supplier',
    allow: canEditSuppliers,
    params: SupplierParams,
    body: VersionBody,
    reply: Supplier,
    run: ({ actor, params, body }) => archiveSupplier(actor, params.supplier, body.version, true),
  }),
  clubRoute({
    method: 'post',
    path: `${one}/restore`,
    summary: 'Bring an archived supplier back',
    allow: canEditSuppliers,
    params: SupplierParams,
    body: VersionBody,
    reply: Supplier,
    run: ({ actor, params, body }) => archiveSupplier(actor, params.supplier, body.version, false),
  }),
  clubRoute({
    method: 'post',
    path: `${one}/offers`,
    summary: 'Add an offer',
    allow: canEditSuppliers,
    params: SupplierParams,
    body: OfferBody,
    reply: Offer,
    status: 201,
    run: ({ actor, params, body }) => addOffer(actor, params.supplier, body),
  }),
  clubRoute({
    method: 'put',
    path: offer,
    summary: 'Change an offer',
    allow: canEditSuppliers,
    params: OfferParams,
    body: OfferChange,
    reply: Offer,
    run: ({ actor, params, body: { version, ...fields } }) =>
      changeOffer(actor, params.supplier, params.offer, version, fields),
  }),
  clubRoute({
    method: 'post',
    path: `${offer}/archive`,
    summary: 'Archive an offer',
    allow: canEditSuppliers,
    params: OfferParams,
    body: VersionBody,
    reply: Offer,
    run: ({ actor, params, body }) =>
      archiveOffer(actor, params.supplier, params.offer, body.version, true),
  }),
  clubRoute({
    method: 'post',
    path: `${offer}/restore`,
    summary: 'Bring an archived offer back',
    allow: canEditSuppliers,
    params: OfferParams,
    body: VersionBody,
    reply: Offer,
    run: ({ actor, params, body }) =>
      archiveOffer(actor, params.supplier, params.offer, body.version, false),
  }),
  clubRoute({
    method: 'get',
    path: `${offer}/prices`,
    summary: 'Every price an offer had',
    allow: canReadSalts,
    params: OfferParams,
    reply: OfferPrices,
    run: async ({ actor, params }) => ({
      prices: await listOfferPrices(actor.club.id, params.supplier, params.offer),
    }),
  }),
];
