import type * as schema from './downloads-schema.ts';
import { endpoint } from './endpoint.ts';

/** What a browser saves as a file rather than reads as JSON. */
export const getOrderCalendar = endpoint<typeof schema.getOrderCalendarSchema>(
  'GET',
  '/api/orders/:token/calendar.ics',
  'public',
);
/** As it stands now, as a PDF. */
export const getReceipt = endpoint<typeof schema.getReceiptSchema>('GET', '/api/orders/:token/receipt.pdf', 'public');
/** The last phase of the allocation's model, so that anyone can check it with another solver. */
export const getAllocationModel = endpoint<typeof schema.getAllocationModelSchema>(
  'GET',
  '/api/allocations/:allocationId/model.lp',
  ['owner'],
);
/** The same in the older format, which every solver reads. */
export const getAllocationModelMps = endpoint<typeof schema.getAllocationModelSchema>(
  'GET',
  '/api/allocations/:allocationId/model.mps',
  ['owner'],
);
