// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { CheckoutForm } from '#components/checkout/checkout-form.tsx';
import { checkoutResolver } from '#hooks/checkout-resolver.ts';
import { makePoints } from '#tests/support/make-shop.ts';

afterEach(cleanup);

const SLOT = '99999999-9999-4999-8999-000000000001';

type Props = Parameters<typeof CheckoutForm>[0];

function draw(over: Partial<Props> = {}) {
  const onSubmit = vi.fn<Props['onSubmit']>();
  const [gate] = makePoints();
  if (!gate) throw new Error('the fixture has no place');
  const points = [{ ...gate, slots: gate.slots.map((slot, at) => (at === 0 ? { ...slot, id: SLOT } : slot)) }];
  const props: Props = {
    points,
    resolver: checkoutResolver,
    known: {},
    terms: null,
    buttonLabel: 'Go to payment · £76.00',
    isSending: false,
    refusal: undefined,
    onSubmit,
    ...over,
  };
  const { rerender } = render(<CheckoutForm {...props} />);
  return { onSubmit, redraw: (more: Partial<Props>) => rerender(<CheckoutForm {...props} {...more} />) };
}

function type(label: RegExp, text: string): void {
  fireEvent.change(screen.getByLabelText(label), { target: { value: text } });
}

const press = () => fireEvent.click(screen.getByRole('button', { name: /Go to payment/ }));

async function fillIn(): Promise<void> {
  fireEvent.click(screen.getByRole('radio', { name: /14:00–14:30/ }));
  type(/^Name/, 'Nell Arkwright');
  type(/^E-mail/, 'nell@example.com');
  type(/^Phone/, '01632 960144');
  await waitFor(() => expect(screen.getByLabelText(/^Phone/)).toHaveProperty('value', '01632 960144'));
}

describe('the checkout form', () => {
  it('sent empty, says beside each field what is missing and goes to the first of them', async () => {
    const { onSubmit } = draw();
    press();
    // The contract's schema comes over an import of its own, which takes its time on a busy machine.
    expect(await screen.findByText('Choose a place and a time.', {}, { timeout: 30_000 })).toBeTruthy();
    expect(screen.getByText('Give an e-mail address such as name@example.com.')).toBeTruthy();
    const email = screen.getByLabelText(/^E-mail/);
    expect(email.getAttribute('aria-invalid')).toBe('true');
    expect(document.activeElement?.getAttribute('type')).toBe('radio');
    expect(onSubmit).not.toHaveBeenCalled();
  });

  it('filled in, sends the trimmed fields by the rules of the contract', async () => {
    const { onSubmit } = draw();
    await fillIn();
    type(/^Name/, '  Nell 🐂 Arkwright ');
    press();
    await waitFor(() => expect(onSubmit).toHaveBeenCalled());
    expect(onSubmit.mock.calls[0]?.[0]).toEqual({
      way: 'collect',
      pay: 'in full',
      ...{ street: '', town: '', postcode: '' },
      slotId: SLOT,
      name: 'Nell 🐂 Arkwright',
      email: 'nell@example.com',
      phone: '01632 960144',
      note: '',
      wantsNews: false,
    });
  });

  it('a name of four hundred letters, is refused in words', async () => {
    const { onSubmit } = draw();
    await fillIn();
    type(/^Name/, 'N'.repeat(400));
    press();
    expect(await screen.findByText('At most 120 characters.')).toBeTruthy();
    expect(onSubmit).not.toHaveBeenCalled();
  });

  it('refused by the farm, shows the sentence and puts what belongs to a field beside it', async () => {
    const { redraw } = draw();
    await fillIn();
    redraw({
      refusal: { message: 'This time has just been taken.', fields: { slotId: 'This time has just been taken.' } },
    });
    await waitFor(() => expect(screen.getAllByText('This time has just been taken.')).toHaveLength(2));
  });

  it('while it is sent, takes no second press', async () => {
    const { onSubmit } = draw({ isSending: true });
    await fillIn();
    fireEvent.click(screen.getByRole('button', { name: 'Keeping it for you …' }));
    await waitFor(() => expect(screen.getByRole('button').getAttribute('aria-busy')).toBe('true'));
    expect(onSubmit).not.toHaveBeenCalled();
  });

  it('knowing who is signed in, fills in name and e-mail unless something was typed', async () => {
    const { redraw } = draw();
    type(/^Name/, 'N. A.');
    redraw({ known: { name: 'Nell Arkwright', email: 'nell@example.com' } });
    await waitFor(() => expect(screen.getByLabelText(/^E-mail/)).toHaveProperty('value', 'nell@example.com'));
    expect(screen.getByLabelText(/^Name/)).toHaveProperty('value', 'N. A.');
  });

  it('the fields, carry the tokens by which browsers fill them in', () => {
    draw();
    const tokens = [/^Name/, /^E-mail/, /^Phone/].map((label) =>
      screen.getByLabelText(label).getAttribute('autocomplete'),
    );
    expect(tokens).toEqual(['name', 'email', 'tel']);
  });
});
