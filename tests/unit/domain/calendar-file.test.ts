import { expect, test } from 'vitest';
import { calendarFile, type CalendarEvent } from '#shared/domain/calendar-file.ts';

const event: CalendarEvent = {
  uid: 'order-1@example.com',
  sequence: 3,
  madeAt: new Date('2026-07-01T09:30:00Z'),
  startsAt: new Date('2026-07-04T09:00:00Z'),
  endsAt: new Date('2026-07-04T09:30:00Z'),
  title: 'Collect your beef',
  place: 'The farm gate',
  description: 'Order 1001.',
  url: 'https://shop.example.com/orders/abc',
  isCancelled: false,
};

test('an event in summer is written in British summer time, with the rules of both', () => {
  const file = calendarFile(event);
  expect(file).toContain('DTSTART;TZID=Europe/London:20260704T100000\r\n');
  expect(file).toContain('DTEND;TZID=Europe/London:20260704T103000\r\n');
  expect(file).toContain('DTSTAMP:20260701T093000Z\r\n');
  expect(file).toContain('RRULE:FREQ=YEARLY;BYMONTH=3;BYDAY=-1SU\r\n');
  expect(file).toContain('RRULE:FREQ=YEARLY;BYMONTH=10;BYDAY=-1SU\r\n');
  expect(file).toContain('SEQUENCE:3\r\n');
});

test('an event in winter is written in Greenwich time', () => {
  const file = calendarFile({ ...event, startsAt: new Date('2026-12-12T10:00:00Z') });
  expect(file).toContain('DTSTART;TZID=Europe/London:20261212T100000\r\n');
});

test('commas, semicolons, backslashes and line breaks are escaped, so that no line can be slipped in', () => {
  const file = calendarFile({ ...event, place: 'Barn; yard, by the \\ wall\r\nBEGIN:VALARM' });
  expect(file).toContain('LOCATION:Barn\\; yard\\, by the \\\\ wall\\nBEGIN:VALARM\r\n');
  expect(file.match(/^BEGIN:VALARM/m)).toBeNull();
});

test('no line is longer than 75 octets, and folding breaks no character', () => {
  const description = 'Über die Brücke, then left at the 🐄 and the second gate. '.repeat(8).trim();
  const file = calendarFile({ ...event, description });
  for (const line of file.split('\r\n')) expect(Buffer.byteLength(line)).toBeLessThanOrEqual(75);
  const unfolded = file.replace(/\r\n /g, '');
  expect(unfolded).toContain(`DESCRIPTION:${description.replaceAll(',', '\\,')}`);
});

test('a cancelled order takes its event back', () => {
  expect(calendarFile({ ...event, isCancelled: true })).toContain('STATUS:CANCELLED\r\n');
});

test('every line ends as the standard wants and every part that begins ends', () => {
  const lines = calendarFile(event).split('\r\n');
  expect(lines.at(-1)).toBe('');
  expect(lines.some((line) => line.includes('\n'))).toBe(false);
  const open = lines.filter((line) => line.startsWith('BEGIN:')).map((line) => line.slice(6));
  const shut = lines.filter((line) => line.startsWith('END:')).map((line) => line.slice(4));
  expect([...shut].sort()).toEqual([...open].sort());
});
