import { describeRights } from '#tests/support/rights.ts';

const own =
  /^\/(clubs|public\/:club|clubs\/:club(\/(shelf-limit|first-steps|members|guests|me|leave|invitations|audit)(\/.*)?)?|invitations\/.*)$/;

describeRights('clubs', (route) => own.test(route.path), {
  'POST /clubs': 'account',
  'GET /public/:club': 'anyone',
  'GET /clubs/:club': 'everyone',
  'PATCH /clubs/:club': ['steward'],
  'PUT /clubs/:club/shelf-limit': ['treasurer'],
  'GET /clubs/:club/first-steps': 'everyone',
  'GET /clubs/:club/members': 'everyone',
  'PUT /clubs/:club/members/:member/roles': ['steward'],
  'DELETE /clubs/:club/members/:member': ['steward'],
  'POST /clubs/:club/members/:member/approve': ['steward'],
  'POST /clubs/:club/members/:member/refuse': ['steward'],
  'POST /clubs/:club/guests': ['steward'],
  'PUT /clubs/:club/guests/:member': ['steward'],
  'PATCH /clubs/:club/me': 'everyone',
  'POST /clubs/:club/leave': 'everyone',
  'GET /invitations/:token': 'anyone',
  'POST /invitations/:token/accept': 'account',
  'GET /clubs/:club/invitations': ['steward'],
  'POST /clubs/:club/invitations': ['steward'],
  'DELETE /clubs/:club/invitations/:invitation': ['steward'],
  'POST /clubs/:club/invitations/:invitation/resend': ['steward'],
  'GET /clubs/:club/audit': ['steward'],
  'GET /clubs/:club/audit/choices': ['steward'],
});
