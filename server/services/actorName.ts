/** Who does something: a member, or a named job. Never absent. */
export interface By {
  readonly membershipId: string | null;
  readonly name: string;
  readonly requestId?: string;
}

/** A job or the demo's loader as the one who acts. */
export function systemActor(name: string): By {
  return { membershipId: null, name };
}
