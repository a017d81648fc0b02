import type { BuyState } from '#shared/domain/buys/states.ts';
import type { Roles } from '#shared/schemas/fields.ts';

/** What a policy may know of somebody in a club; every ClubActor is one. */
export interface ClubStanding {
  readonly membershipId: string;
  readonly status: 'active' | 'left' | 'removed';
  readonly roles: Roles;
}

/** What a policy may know of somebody before one buy; every BuyActor is one. */
export interface BuyStanding extends ClubStanding {
  readonly buy: {
    readonly state: BuyState;
    readonly responsibleId: string;
    readonly organises: boolean;
    readonly helps: boolean;
    readonly takesCash: boolean;
    readonly takesPart: boolean;
  };
}
