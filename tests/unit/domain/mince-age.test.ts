import { describe, expect, it } from 'vitest';
import { judgeMince, type MinceEffect } from '#shared/domain/mince-age.ts';

const rule = (effect: MinceEffect) => ({ effect, days: 6, baggedDays: 15 });
const beast = (daysFromKill: number, isBagged = false) => ({ name: '00214', daysFromKill, isBagged });
const NOTHING = { closedReason: null, caution: null };

describe('the age of meat for mincing', () => {
  it('to the day of the limit says nothing, a day later says which carcase and whom to ask', () => {
    expect(judgeMince(rule('caution'), [beast(6)])).toEqual(NOTHING);
    const { caution, closedReason } = judgeMince(rule('caution'), [beast(5), beast(7)]);
    expect(caution).toContain('00214 (7 days after kill, limit 6)');
    expect(caution).toContain('official veterinarian');
    expect(closedReason).toBeNull();
  });

  it('of beef boned and bagged is judged by its own limit', () => {
    expect(judgeMince(rule('close'), [beast(15, true)])).toEqual(NOTHING);
    expect(judgeMince(rule('close'), [beast(16, true)]).closedReason).toContain('limit 15');
  });

  it('closes mincing only where the premises have set that, and is silent where they have set nothing', () => {
    expect(judgeMince(rule('close'), [beast(21)])).toMatchObject({ caution: null });
    expect(judgeMince(rule('close'), [beast(21)]).closedReason).toContain('closed for this day by your setting');
    expect(judgeMince(rule('none'), [beast(21)])).toEqual(NOTHING);
  });
});
