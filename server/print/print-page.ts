import path from 'node:path';
import PDFDocument from 'pdfkit';

const FONTS = path.join(import.meta.dirname, '../../fonts/print');

/** Points from the edge, and the room between. A4 is 595 by 842 points. */
export const EDGE = 50;
export const WIDTH = 595.28 - 2 * EDGE;

/** An A4 document in the farm's own letters; a stream, so that it is sent while it is written. */
export function startPrint(about: { title: string; author: string }): PDFKit.PDFDocument {
  const print = new PDFDocument({
    size: 'A4',
    margin: EDGE,
    lang: 'en-GB',
    displayTitle: true,
    info: { Title: about.title, Author: about.author },
  });
  print.registerFont('heading', path.join(FONTS, 'besley-700.woff'));
  print.registerFont('text', path.join(FONTS, 'public-sans-400.woff'));
  print.registerFont('bold', path.join(FONTS, 'public-sans-700.woff'));
  return print.font('text').fontSize(10);
}

export function printHeading(print: PDFKit.PDFDocument, text: string): void {
  print.moveDown(1).font('heading').fontSize(13).text(text, EDGE).font('text').fontSize(10).moveDown(0.3);
}

/** A line over the whole width, and room below it. */
export function printRule(print: PDFKit.PDFDocument): void {
  print
    .moveTo(EDGE, print.y)
    .lineTo(EDGE + WIDTH, print.y)
    .lineWidth(0.5)
    .stroke();
  print.y += 5;
}

/** Words at the left and a figure at the right, on a page of their own when this one is full. */
export function printRow(print: PDFKit.PDFDocument, row: { words: string; figure: string; isBold?: boolean }): void {
  const figureWidth = 110;
  const wordsWidth = WIDTH - figureWidth - 10;
  print.font(row.isBold ? 'bold' : 'text');
  const height = print.heightOfString(row.words, { width: wordsWidth });
  if (print.y + height > print.page.height - EDGE) print.addPage();
  const top = print.y;
  print.text(row.figure, EDGE + WIDTH - figureWidth, top, { width: figureWidth, align: 'right' });
  print.text(row.words, EDGE, top, { width: wordsWidth });
  print.y = top + height + 4;
  print.font('text');
  printRule(print);
}
