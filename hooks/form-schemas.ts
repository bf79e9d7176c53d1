/**
 * All that checks a form before it is sent, in one piece that comes over `import()`. What two such pieces share is put
 * into the file that every page loads: with the schemas fetched one by one, each visitor of the shop would load zod.
 */
export { zodResolver } from '@hookform/resolvers/zod';
export * as account from '#shared/contracts/account-schema.ts';
export * as carcases from '#shared/contracts/carcases-schema.ts';
export * as checkout from '#shared/contracts/checkout-form-schema.ts';
export * as delivery from '#shared/contracts/delivery-schema.ts';
export * as customers from '#shared/contracts/customers-schema.ts';
export * as herd from '#shared/contracts/herd-schema.ts';
export * as margin from '#shared/contracts/margin-schema.ts';
export * as office from '#shared/contracts/office-schema.ts';
export * as orders from '#shared/contracts/orders-schema.ts';
export * as packs from '#shared/contracts/packs-schema.ts';
export * as promo from '#shared/contracts/promo-schema.ts';
export * as planJobs from '#shared/contracts/plan-jobs-schema.ts';
export * as specifications from '#shared/contracts/specifications-schema.ts';
export * as trade from '#shared/contracts/trade-schema.ts';
