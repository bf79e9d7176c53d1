import type { WaitingPlace } from '#shared/contracts/waiting-list.ts';
import { formatDay, formatDayTime } from '#shared/domain/words.ts';

/** How a place on the list stands, for its page. */
export function placeWords(place: WaitingPlace): { title: string; lead: string } {
  const { box, day, ahead, kept, state } = place;
  const which = `${box}${day ? ` for ${formatDay(day)}` : ''}`;
  switch (state) {
    case 'unconfirmed':
      return { title: `Wait for ${which}?`, lead: 'We write when there is one, and keep it for you for a while.' };
    case 'waiting':
      return {
        title: `You are on the list for ${which}`,
        lead: ahead === 0 ? 'You are next.' : `${ahead} ${ahead === 1 ? 'person waits' : 'people wait'} before you.`,
      };
    case 'offered':
      return {
        title: `${box} is kept for you`,
        lead: kept ? `Of ${formatDay(kept.day)}, until ${formatDayTime(kept.until)}.` : '',
      };
    case 'taken':
      return { title: 'You took your box', lead: 'This link is used up. The order has a mail of its own.' };
    case 'lapsed':
      return { title: 'The time has run out', lead: `${box} went to the next on the list. You can wait again.` };
    case 'left':
      return { title: 'You are off the list', lead: 'We do not write about this box any more.' };
  }
}
