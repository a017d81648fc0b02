import { describeRights } from '#tests/support/rights.ts';

const own = ['/accounts', '/resets', '/email-confirmations', '/account'];

describeRights(
  'accounts',
  (route) => own.some((path) => route.path === path || route.path.startsWith(`${path}/`)),
  {
    'POST /accounts': 'anyone',
    'POST /resets': 'anyone',
    'GET /resets/:token': 'anyone',
    'POST /resets/:token': 'anyone',
    'GET /email-confirmations/:token': 'anyone',
    'POST /email-confirmations/:token': 'anyone',
    'GET /account': 'account',
    'PATCH /account': 'account',
    'PUT /account/password': 'account',
    'POST /account/email': 'account',
    'DELETE /account/sessions': 'account',
    'DELETE /account': 'account',
  },
);
