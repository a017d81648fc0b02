import { describeRights } from '#tests/support/rights.ts';
import { splitsRoutes } from '#server/routes/splits.ts';

const path = '/clubs/:club/buys/:buy';
const organisers = ['own'] as const;
const weighers = ['own', 'helper', 'cashHelper'] as const;

describeRights(
  'splits',
  (route) => splitsRoutes.includes(route),
  {
    [`GET ${path}/split`]: 'everyone',
    [`GET ${path}/share`]: 'everyone',
    [`POST ${path}/orders/:supplier/arrival`]: organisers,
    [`PUT ${path}/bags/:bag`]: organisers,
    [`POST ${path}/arrive`]: organisers,
    [`GET ${path}/targets`]: organisers,
    [`POST ${path}/targets`]: organisers,
    [`POST ${path}/start-splitting`]: organisers,
    [`POST ${path}/portions/:portion/claim`]: weighers,
    [`POST ${path}/portions/:portion/release`]: weighers,
    [`POST ${path}/portions/:portion/cut`]: weighers,
    [`POST ${path}/portions/:portion/join`]: weighers,
    [`POST ${path}/portions/:portion/void`]: organisers,
    [`POST ${path}/portions/:portion/restore`]: organisers,
    [`POST ${path}/weighings`]: weighers,
    [`POST ${path}/weighings/:weighing/undo`]: weighers,
    [`POST ${path}/bags/:bag/spills`]: weighers,
    [`POST ${path}/spills/:spill/undo`]: weighers,
    [`POST ${path}/bags/:bag/close`]: weighers,
    [`POST ${path}/bags/:bag/reopen`]: weighers,
    [`PUT ${path}/lines/:line/unaccounted-note`]: organisers,
    [`PUT ${path}/excess-loss`]: ['treasurer'],
    [`GET ${path}/final`]: ['own', 'treasurer'],
    [`POST ${path}/finish-splitting`]: organisers,
  },
  'splitting',
);
