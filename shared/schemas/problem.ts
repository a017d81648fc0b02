import { z } from 'zod';

/** The closed list of problem codes; a client may branch on these and on nothing else. */
export const problemCodes = [
  'bad_request',
  'signed_out',
  'forbidden',
  'not_found',
  'stale',
  'wrong_state',
  'invalid',
  'too_large',
  'wrong_type',
  'too_many',
  'foreign_origin',
  'wrong_password',
  'token_spent',
  'already_there',
  'last_of_role',
  'buy_locked',
  'buy_frozen',
  'closing_soon',
  'overdue_elsewhere',
  'hazard_unconfirmed',
  'not_a_line',
  'plan_infeasible',
  'minimum_unmet',
  'shelf_limit',
  'price_limit',
  'unpaid',
  'bill_unconfirmed',
  'sums_open',
  'still_owed',
  'unavailable',
  'unexpected',
] as const;

export const ProblemCode = z.enum(problemCodes);
export type ProblemCode = z.infer<typeof ProblemCode>;

/** RFC 9457 problem document, with `code` to branch on, `errors` by field path and `current` for a stale write. */
export const Problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  code: ProblemCode,
  requestId: z.string().optional(),
  errors: z.record(z.string(), z.string()).optional(),
  current: z.unknown().optional(),
});
export type Problem = z.infer<typeof Problem>;
