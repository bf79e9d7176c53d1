import { londonDayAndTime } from './words.ts';

export type CalendarEvent = {
  uid: string;
  /** Raised with every change, so that a calendar takes the newer file. */
  sequence: number;
  madeAt: Date;
  startsAt: Date;
  endsAt: Date;
  title: string;
  place: string;
  description: string;
  url: string;
  isCancelled: boolean;
};

/** RFC 5545, section 3.6.5: both changes of the clock fall on the last Sunday, at one o'clock Greenwich. */
const LONDON = [
  'BEGIN:VTIMEZONE',
  'TZID:Europe/London',
  'BEGIN:DAYLIGHT',
  'TZOFFSETFROM:+0000',
  'TZOFFSETTO:+0100',
  'TZNAME:BST',
  'DTSTART:19960331T010000',
  'RRULE:FREQ=YEARLY;BYMONTH=3;BYDAY=-1SU',
  'END:DAYLIGHT',
  'BEGIN:STANDARD',
  'TZOFFSETFROM:+0100',
  'TZOFFSETTO:+0000',
  'TZNAME:GMT',
  'DTSTART:19961027T020000',
  'RRULE:FREQ=YEARLY;BYMONTH=10;BYDAY=-1SU',
  'END:STANDARD',
  'END:VTIMEZONE',
];

/** One event on the farm's clock, as a file that a calendar takes in. */
export function calendarFile(event: CalendarEvent): string {
  const lines = [
    'BEGIN:VCALENDAR',
    'VERSION:2.0',
    'PRODID:-//Wholeside//Collection//EN',
    'CALSCALE:GREGORIAN',
    'METHOD:PUBLISH',
    ...LONDON,
    'BEGIN:VEVENT',
    `UID:${event.uid}`,
    `SEQUENCE:${event.sequence}`,
    `DTSTAMP:${utcStamp(event.madeAt)}`,
    `DTSTART;TZID=Europe/London:${londonStamp(event.startsAt)}`,
    `DTEND;TZID=Europe/London:${londonStamp(event.endsAt)}`,
    `SUMMARY:${escapeText(event.title)}`,
    `LOCATION:${escapeText(event.place)}`,
    `DESCRIPTION:${escapeText(event.description)}`,
    `URL:${event.url}`,
    `STATUS:${event.isCancelled ? 'CANCELLED' : 'CONFIRMED'}`,
    'END:VEVENT',
    'END:VCALENDAR',
  ];
  return lines.map((line) => `${fold(line)}\r\n`).join('');
}

function utcStamp(instant: Date): string {
  return `${instant.toISOString().slice(0, 19).replace(/[-:]/g, '')}Z`;
}

function londonStamp(instant: Date): string {
  const { day, time } = londonDayAndTime(instant);
  return `${day.replaceAll('-', '')}T${time.replace(':', '')}00`;
}

function escapeText(text: string): string {
  return text.replace(/[\\;,]/g, '\\$&').replace(/\r\n|\r|\n/g, '\\n');
}

/** At most 75 octets a line (section 3.1), never in the middle of a character. */
function fold(line: string): string {
  let folded = '';
  let octets = 0;
  for (const character of line) {
    const size = octetsOf(character);
    if (octets + size > 75) {
      folded += '\r\n ';
      octets = 1;
    }
    folded += character;
    octets += size;
  }
  return folded;
}

function octetsOf(character: string): number {
  const point = character.codePointAt(0) ?? 0;
  if (point < 0x80) return 1;
  if (point < 0x800) return 2;
  return point < 0x10000 ? 3 : 4;
}
