export { groupReference, paymentReference } from '../ledger/reference.ts';
