import type { Readable } from 'node:stream';
import type { Order } from '#shared/contracts/orders.ts';
import { londonDay } from '#shared/domain/day.ts';
import { formatDayWithYear, formatGrams, formatMoney, formatWeight } from '#shared/domain/words.ts';
import { AppError } from '#shared/errors.ts';
import type { Deps } from '#server/deps.ts';
import { getFarm, type Farm } from '#server/farm/farm-queries.ts';
import { getOrderByToken } from '#server/orders/read-order.ts';
import { readOrder } from '#server/orders/view-order.ts';
import { listPayments, type PaymentRow } from '#server/payments/payment-queries.ts';
import { EDGE, printHeading, printRow, printRule, startPrint, WIDTH } from '#server/print/print-page.ts';

/** The receipt of an order that was paid for, as it stands now: refunds and weights are on it once they are known. */
export async function writeReceipt(deps: Deps, token: string): Promise<{ orderNo: number; file: Readable }> {
  const row = await getOrderByToken(deps.db, token);
  const [order, farm, payments] = await Promise.all([
    readOrder(deps, token),
    getFarm(deps.db),
    listPayments(deps.db, row.id),
  ]);
  const moved = payments.filter((payment) => payment.state === 'done');
  if (moved.length === 0) {
    throw new AppError('NOT_FOUND', 'There is a receipt once the order is paid for. Nothing was charged yet.');
  }
  const print = startPrint({ title: `Receipt for order ${order.orderNo}`, author: farm.businessName });
  printHead(print, { farm, order, discountPence: row.discountPence, deliveryPence: row.deliveryPence });
  printMoney(print, moved);
  printPacks(print, order);
  print
    .moveDown(1)
    .fillColor('#5A514B')
    .text(
      `As it stands on ${formatDayWithYear(deps.clock.today())}. Questions: ${farm.email} or ${farm.phone}.`,
      EDGE,
      undefined,
      {
        width: WIDTH,
      },
    );
  print.end();
  return { orderNo: order.orderNo, file: print };
}

type Head = { farm: Farm; order: Order; discountPence: number; deliveryPence: number };

function printHead(print: PDFKit.PDFDocument, { farm, order, discountPence, deliveryPence }: Head): void {
  print.font('heading').fontSize(22).text(`Receipt for order ${order.orderNo}`, { width: WIDTH });
  print.font('text').fontSize(10).moveDown(0.5);
  print.text([farm.businessName, ...farm.addressLines].join('\n')).moveDown(0.5);
  print.text(`For ${order.name}\nCut on ${formatDayWithYear(order.day)}`);
  printHeading(print, 'What was ordered');
  printRule(print);
  for (const line of order.lines) {
    const weight = `${line.kind === 'box' ? 'at least' : 'up to'} ${formatWeight(line.unitGrams)}`;
    const each = line.quantity > 1 ? ` each, at ${formatMoney(line.unitPricePence)}` : '';
    printRow(print, {
      words: `${line.quantity} × ${line.name}, ${weight}${each}`,
      figure: formatMoney(line.linePence),
    });
  }
  if (discountPence > 0) printRow(print, { words: 'Discount', figure: formatMoney(-discountPence) });
  if (deliveryPence > 0) printRow(print, { words: 'Delivery', figure: formatMoney(deliveryPence) });
  printRow(print, { words: 'Total', figure: formatMoney(order.totalPence), isBold: true });
}

function printMoney(print: PDFKit.PDFDocument, moved: readonly PaymentRow[]): void {
  printHeading(print, 'What was paid');
  printRule(print);
  for (const { kind, reason, amountPence, createdAt } of moved) {
    const on = formatDayWithYear(londonDay(createdAt));
    const words = kind === 'charge' ? `Paid by card, ${on}` : `Paid back, ${on}: ${plain(reason)}`;
    printRow(print, { words, figure: formatMoney(kind === 'charge' ? amountPence : -amountPence) });
  }
  const sum = moved.reduce((total, row) => total + (row.kind === 'charge' ? row.amountPence : -row.amountPence), 0);
  printRow(print, { words: 'Paid in all', figure: formatMoney(sum), isBold: true });
}

/** Without the payment company's own number at the end. */
function plain(reason: string): string {
  return reason.replace(/ \(pi_[^)]*\)$/, '');
}

function printPacks(print: PDFKit.PDFDocument, { packs }: Order): void {
  if (packs.length === 0) return;
  printHeading(print, 'What was packed');
  printRule(print);
  for (const { cut, code, box, grams } of packs) {
    printRow(print, { words: `${cut} (${code})${box ? `, in ${box}` : ''}`, figure: formatGrams(grams) });
  }
  const grams = packs.reduce((sum, pack) => sum + pack.grams, 0);
  printRow(print, { words: 'Weight in all', figure: formatGrams(grams), isBold: true });
}
