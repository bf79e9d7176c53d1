import { getReceipt } from '#shared/contracts/downloads.ts';
import { getReceiptSchema } from '#shared/contracts/downloads-schema.ts';
import type { Deps } from '#server/deps.ts';
import { download, type Api } from '#server/http/route.ts';
import { writeReceipt } from './receipt.ts';

export function addReceiptRoutes(api: Api, deps: Deps): void {
  download(api, getReceipt, {
    schema: getReceiptSchema,
    handle: async ({ params }) => {
      const { orderNo, file } = await writeReceipt(deps, params.token);
      return { contentType: 'application/pdf', filename: `receipt-order-${orderNo}.pdf`, body: file };
    },
  });
}
