// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, within } from '@testing-library/react';
import type { ReactNode } from 'react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { MyOrders } from '#components/account/my-orders.tsx';
import { BasketItemRow } from '#components/basket/basket-item.tsx';
import { BoxBuy } from '#components/boxes/box-buy.tsx';
import { BoxJsonLd } from '#components/boxes/box-json-ld.tsx';
import { CookingFilter } from '#components/cuts/cooking-filter.tsx';
import { CancelOrder } from '#components/orders/cancel-order.tsx';
import { LoadedView } from '#components/shop/loaded-view.tsx';
import { Stock } from '#components/ui/stock.tsx';
import { AppError } from '#shared/errors.ts';
import { makeBox, makeCut, makeOrderView, THURSDAY, WEEK_LATER } from '#tests/support/make-shop.ts';

vi.mock('expo-router', () => ({
  Link: ({ href, children, 'aria-label': name }: { href: string; children: ReactNode; 'aria-label'?: string }) => (
    <a href={href} aria-label={name}>
      {children}
    </a>
  ),
}));

afterEach(cleanup);

describe('what is left', () => {
  it.each([
    [{ free: 14, held: 3 }, '14 left'],
    [{ free: 2, held: 3 }, '2 left, 3 held'],
    [{ free: 0, held: 2 }, 'None left, 2 held'],
    [{ free: 0, held: 0 }, 'Sold out'],
    [{ free: 9, held: 0, open: false }, 'Orders are closed'],
  ])('with %o, reads %s', (stock, words) => {
    render(<Stock {...stock} />);
    expect(screen.getByText(words)).toBeTruthy();
  });
});

describe('buying a box', () => {
  const draw = (over: Partial<Parameters<typeof BoxBuy>[0]> = {}) => {
    const onQuantity = vi.fn();
    const onDay = vi.fn();
    render(<BoxBuy box={makeBox()} dayId={THURSDAY} onDay={onDay} quantity={0} onQuantity={onQuantity} {...over} />);
    return { onQuantity, onDay };
  };

  it('not in the basket yet, offers one button that adds it', () => {
    const { onQuantity } = draw();
    fireEvent.click(screen.getByRole('button', { name: 'Add to basket' }));
    expect(onQuantity).toHaveBeenCalledWith(1);
    expect(screen.queryByRole('link', { name: /Go to basket/ })).toBeNull();
  });

  it('in the basket, counts with a named stepper and leads to the basket', () => {
    const { onQuantity } = draw({ quantity: 1 });
    fireEvent.click(
      within(screen.getByRole('group', { name: 'Ember' })).getByRole('button', { name: 'One more: Ember' }),
    );
    expect(onQuantity).toHaveBeenCalledWith(2);
    expect(screen.getByRole('link', { name: /Go to basket/ })).toBeTruthy();
  });

  it('at the last one, cannot count further', () => {
    draw({ quantity: 2 });
    expect(screen.getByRole('button', { name: 'One more: Ember' })).toHaveProperty('disabled', true);
  });

  it('sold out on the chosen day, says so and shows what the other day has', () => {
    const box = makeBox();
    const offers = box.offers.map((offer) => (offer.dayId === THURSDAY ? { ...offer, free: 0 } : offer));
    const { onDay } = draw({ box: { ...box, offers } });
    expect(screen.getByRole('button', { name: 'Sold out' })).toHaveProperty('disabled', true);
    fireEvent.click(screen.getByRole('radio', { name: /Thu 17 Dec.*5 left/ }));
    expect(onDay).toHaveBeenCalledWith(WEEK_LATER);
  });

  it('for another day than the basket, says that the basket moves', () => {
    draw({ movesFrom: '2026-12-17' });
    expect(screen.getByText(/Your basket is for Thu 17 Dec\. .*moves all of it to Thu 10 Dec\./)).toBeTruthy();
  });
});

describe('a thing in the basket', () => {
  const line = {
    offerId: 'offer',
    kind: 'box' as const,
    name: 'Ember',
    quantity: 3,
    free: 2,
    unitPricePence: 10_240,
    linePence: 30_720,
    unitGrams: 4_000,
  };
  const draw = (over: Partial<Parameters<typeof BasketItemRow>[0]> = {}) => {
    const onQuantity = vi.fn();
    const onDay = vi.fn();
    const elsewhere = { id: WEEK_LATER, day: '2026-12-17', free: 5 };
    render(<BasketItemRow name="Ember" quantity={3} {...{ line, elsewhere, onQuantity, onDay }} {...over} />);
    return { onQuantity, onDay };
  };

  it('of which fewer are left, says how many and takes them at a press', () => {
    const { onQuantity } = draw();
    expect(screen.getByText('Only 2 are left for this day.')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Take 2' }));
    expect(onQuantity).toHaveBeenCalledWith(2);
  });

  it('that is gone, offers the day that has it', () => {
    const { onDay } = draw({ line: undefined });
    expect(screen.getByText('Ember is gone for this day.')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: /Move the basket to Thu 17 Dec/ }));
    expect(onDay).toHaveBeenCalledWith(WEEK_LATER);
  });

  it('that can be had, says nothing of the kind and can be taken out', () => {
    const { onQuantity } = draw({ quantity: 1, line: { ...line, quantity: 1, linePence: 10_240 } });
    expect(screen.queryByText(/left for this day|is gone/)).toBeNull();
    expect(screen.getByText('£102.40')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Take out: Ember' }));
    expect(onQuantity).toHaveBeenCalledWith(0);
  });
});

describe('the filter by cooking', () => {
  it('offers only what is on the counter', () => {
    const onChange = vi.fn();
    const cuts = [makeCut(), makeCut({ id: 'rump', cooking: 'grill' })];
    render(<CookingFilter cuts={cuts} value="all" onChange={onChange} />);
    const names = screen.getAllByRole('radio').map((radio) => radio.closest('label')?.textContent);
    expect(names).toEqual(['All', 'Grill or pan', 'Mince']);
    fireEvent.click(screen.getByRole('radio', { name: 'Mince' }));
    expect(onChange).toHaveBeenCalledWith('mince');
  });
});

describe('a page that was begun on the server', () => {
  const query = { data: undefined, error: null, refetch: vi.fn() };
  const draw = (state: 'ready' | 'missing' | 'failed', over = {}) =>
    render(
      <LoadedView<string> loaded={{ state }} query={{ ...query, ...over }} what="the box" waiting={<p>bones</p>}>
        {(data) => <p>{data}</p>}
      </LoadedView>,
    ).container;

  it('missing, marks itself as a 404 for the server', () => {
    expect(draw('missing').querySelector('[data-page-status]')?.getAttribute('data-page-status')).toBe('404');
    expect(screen.getByRole('heading', { level: 1 })).toBeTruthy();
  });

  it('failed, marks itself as a 503 and waits for the browser to ask again', () => {
    expect(draw('failed').querySelector('[data-page-status]')?.getAttribute('data-page-status')).toBe('503');
    expect(screen.getByRole('status', { name: 'Fetching the box' })).toBeTruthy();
  });

  it('failed again in the browser, says what happened and asks again at a press', () => {
    draw('failed', { error: new AppError('INTERNAL', 'A fault of ours.') });
    expect(screen.getByText('A fault of ours.')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(query.refetch).toHaveBeenCalledOnce();
  });

  it('ready, shows its figures and no mark', () => {
    expect(draw('ready', { data: 'Ember' }).querySelector('[data-page-status]')).toBeNull();
    expect(screen.getByText('Ember')).toBeTruthy();
  });
});

describe('a box for search engines', () => {
  it('with a script in its name, cannot end the script that it stands in', () => {
    const box = makeBox({ name: '</script><script>alert(1)</script>' });
    const { container } = render(<BoxJsonLd box={box} farmName="Skelderwick" />);
    const script = container.querySelector('script')?.innerHTML ?? '';
    expect(script).not.toContain('</script');
    expect(JSON.parse(script)).toMatchObject({
      offers: { price: '102.40', priceCurrency: 'GBP', availability: 'https://schema.org/InStock' },
    });
  });
});

describe('cancelling an order', () => {
  it('asks once more before it is done', () => {
    const onCancel = vi.fn();
    render(<CancelOrder order={makeOrderView()} onCancel={onCancel} isCancelling={false} refusal={undefined} />);
    fireEvent.click(screen.getByRole('button', { name: 'Cancel the order' }));
    expect(onCancel).not.toHaveBeenCalled();
    fireEvent.click(screen.getByRole('button', { name: 'Yes, cancel it' }));
    expect(onCancel).toHaveBeenCalledOnce();
  });
});

describe('the orders of an account', () => {
  it('without any, leads to the boxes', () => {
    render(<MyOrders orders={[]} again={() => null} />);
    expect(screen.getByRole('link', { name: 'See the boxes' }).getAttribute('href')).toBe('/');
  });
});
