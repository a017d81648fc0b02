import { describeRights } from '#tests/support/rights.ts';

const path = '/clubs/:club';
const offer = `${path}/suppliers/:supplier/offers/:offer`;
const editors = ['organiser', 'own', 'steward'] as const;

describeRights('salts', (route) => /^\/clubs\/:club\/salts/.test(route.path), {
  [`GET ${path}/salts`]: 'everyone',
  [`POST ${path}/salts`]: ['steward'],
  [`PUT ${path}/salts/:salt`]: ['steward'],
  [`POST ${path}/salts/:salt/archive`]: ['steward'],
  [`POST ${path}/salts/:salt/restore`]: ['steward'],
  [`PUT ${path}/salts/:salt/hidden`]: ['steward'],
});

describeRights('suppliers', (route) => route.path.startsWith('/clubs/:club/suppliers'), {
  [`GET ${path}/suppliers`]: 'everyone',
  [`POST ${path}/suppliers`]: editors,
  [`GET ${path}/suppliers/:supplier`]: 'everyone',
  [`PUT ${path}/suppliers/:supplier`]: editors,
  [`POST ${path}/suppliers/:supplier/archive`]: editors,
  [`POST ${path}/suppliers/:supplier/restore`]: editors,
  [`POST ${path}/suppliers/:supplier/offers`]: editors,
  [`PUT ${offer}`]: editors,
  [`POST ${offer}/archive`]: editors,
  [`POST ${offer}/restore`]: editors,
  [`GET ${offer}/prices`]: 'everyone',
  [`GET ${path}/suppliers/import-template.csv`]: 'everyone',
  [`GET ${path}/suppliers/:supplier/offers.csv`]: 'everyone',
  [`POST ${path}/suppliers/:supplier/import/preview`]: editors,
  [`POST ${path}/suppliers/:supplier/import`]: editors,
});
