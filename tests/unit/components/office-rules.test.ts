import { describe, expect, it } from 'vitest';
import { describeMails, sendable } from '#components/collections/mail-choice.ts';
import { describeAnimal, findAnimals } from '#components/herd/animal-state.ts';
import { dayPlaces, mayOpen, placesFor } from '#components/office/places.ts';
import { missingWords, nameItem, unfilledFirst } from '#components/packs/fill-words.ts';
import type { Animal } from '#shared/contracts/herd.ts';
import type { CollectionMail, Fill } from '#shared/contracts/packs.ts';

describe('who may open which page of the office', () => {
  it('lets a packer pack and hand over, and nothing that shows money or customers', () => {
    for (const path of [
      '/office',
      '/office/cutting-days',
      '/office/cutting-days/a1/packing',
      '/office/cutting-days/a1/run-sheet',
    ]) {
      expect(mayOpen('packer', path), path).toBe(true);
    }
    for (const path of [
      '/office/today',
      '/office/orders',
      '/office/cutting-days/a1',
      '/office/cutting-days/a1/allocation',
      '/office/cutting-days/new',
      '/office/carcases/a1',
      '/office/settings',
    ]) {
      expect(mayOpen('packer', path), path).toBe(false);
      expect(mayOpen('owner', path), path).toBe(true);
      expect(mayOpen('butcher', path), path).toBe(false);
    }
  });

  it('shows each their own places', () => {
    expect(placesFor('customer')).toEqual([]);
    expect(placesFor('packer').map((place) => place.label)).toEqual(['Cutting days']);
    expect(dayPlaces('a1', 'packer').map((place) => place.label)).toEqual(['Packing', 'Run sheet']);
    expect(dayPlaces('a1', 'owner')).toHaveLength(7);
  });
});

const animal: Animal = {
  id: '7d7f8c1e-1111-4111-8111-111111111111',
  earTag: 'UK123450600214',
  breed: 'Aberdeen Angus',
  sex: 'steer',
  born: '2024-11-20',
  damEarTag: null,
  liveGrams: 620_000,
  ageMonths: 24,
  version: 1,
  withdrawalClearDay: null,
  medicines: [],
  carcase: null,
};

describe('an animal in words', () => {
  it('is in the field, inside a withdrawal period, booked, or further', () => {
    const today = '2026-12-01';
    const booked = { id: animal.id, state: 'booked', killDay: '2026-12-02', cuttingDayId: animal.id };
    expect(describeAnimal(animal, today).words).toBe('in the field');
    expect(describeAnimal({ ...animal, withdrawalClearDay: '2026-12-20' }, today).words).toBe(
      'withdrawal to Sun 20 Dec 2026',
    );
    expect(describeAnimal({ ...animal, carcase: booked }, today).words).toBe('booked for Wed 2 Dec');
    expect(describeAnimal({ ...animal, carcase: { ...booked, state: 'hanging' } }, today).words).toBe('hanging');
    expect(describeAnimal({ ...animal, withdrawalClearDay: today }, today).words).toBe('in the field');
  });

  it('is found by part of the tag, spaces or not, and by breed', () => {
    expect(findAnimals([animal], '123450 600')).toHaveLength(1);
    expect(findAnimals([animal], 'angus')).toHaveLength(1);
    expect(findAnimals([animal], '999')).toHaveLength(0);
    expect(findAnimals([animal], '')).toHaveLength(1);
  });
});

const fill: Fill = {
  kind: 'order',
  orderNo: 1002,
  orderName: 'Ada Beck',
  item: 'Hearth',
  copy: 1,
  isFilled: true,
  isPacked: false,
  grams: 5_100,
  guaranteedGrams: 5_000,
  packs: [],
  missing: [],
};

describe('what is filled and what is missing', () => {
  it('puts the unfilled first, then goes by number and copy', () => {
    const fills = [fill, { ...fill, copy: 2 }, { ...fill, orderNo: 1001 }, { ...fill, orderNo: 1009, isFilled: false }];
    expect(unfilledFirst(fills).map(({ orderNo, copy }) => `${orderNo}.${copy}`)).toEqual([
      '1009.1',
      '1001.1',
      '1002.1',
      '1002.2',
    ]);
  });

  it('names the line and what of it is missing', () => {
    expect(missingWords({ line: 'Steaks', shortGrams: 400, shortPacks: 1 })).toBe('Steaks: 400 g and 1 pack missing');
    expect(missingWords({ line: 'Steaks', shortGrams: 0, shortPacks: 2 })).toBe('Steaks: 2 packs missing');
    expect(missingWords({ line: 'Steaks', shortGrams: 0, shortPacks: 0 })).toBe('Steaks: no fit found');
    expect(nameItem({ item: 'Hearth', copy: 2 })).toBe('Hearth, no. 2');
  });
});

describe('collection mails', () => {
  const mail: CollectionMail = {
    orderId: animal.id,
    orderNo: 1001,
    name: 'Ada Beck',
    email: 'ada@example.com',
    pointName: 'Farm gate',
    startsAt: '2026-12-11T15:00:00.000Z',
    endsAt: '2026-12-11T15:30:00.000Z',
    holdBack: null,
    subject: 'Ready',
    text: '',
    html: '',
    mail: null,
  };
  const sent = { id: animal.id, state: 'sent' as const, attempts: 1, lastError: null, sentAt: null };

  it('may go when nothing holds them back and none was sent', () => {
    const mails = [mail, { ...mail, holdBack: 'Hearth is not filled.' }, { ...mail, mail: sent }];
    expect(sendable(mails)).toEqual([mail]);
    expect(describeMails(mails)).toBe('1 to confirm, 1 held back, 1 sent');
    expect(describeMails([])).toBe('no orders');
  });
});
