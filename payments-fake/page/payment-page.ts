import type Stripe from 'stripe';
import type { CheckoutRecord } from '../store.ts';
import { randomText } from '../ids.ts';
import { testCards } from '../test-cards.ts';
import type { FieldErrors, FieldName, Typed } from './card-form.ts';
import { type Html, html } from './html.ts';

function price(amount: number | null, currency: string | null): string {
  const format = new Intl.NumberFormat('en-GB', { style: 'currency', currency: currency ?? 'gbp' });
  return format.format((amount ?? 0) / 100);
}

function basket({ session, lineItems }: CheckoutRecord): Html {
  const rows = lineItems.map(
    (item) =>
      html`<tr>
        <th scope="row">${item.description} × ${item.quantity}</th>
        <td>${price(item.amount_total, item.currency)}</td>
      </tr>`,
  );
  return html`<table>
    <caption class="tag" style="text-align: left">
      What you pay for
    </caption>
    <tbody>
      ${rows}
    </tbody>
    <tfoot>
      <tr>
        <th scope="row">Total</th>
        <td>${price(session.amount_total, session.currency)}</td>
      </tr>
    </tfoot>
  </table>`;
}

type Field = { name: FieldName; label: string; autocomplete: string; kind: string; hint: string | null };

const numberField: Field = {
  name: 'card',
  label: 'Card number',
  autocomplete: 'cc-number',
  kind: 'numeric',
  hint: null,
};
const expiryField: Field = {
  name: 'expiry',
  label: 'Expiry',
  autocomplete: 'cc-exp',
  kind: 'numeric',
  hint: 'Month / year, such as 08 / 30',
};
const cvcField: Field = {
  name: 'cvc',
  label: 'CVC',
  autocomplete: 'cc-csc',
  kind: 'numeric',
  hint: 'Three figures on the back',
};
const nameField: Field = { name: 'name', label: 'Name on card', autocomplete: 'cc-name', kind: 'text', hint: null };
const emailField: Field = { name: 'email', label: 'E-mail', autocomplete: 'email', kind: 'email', hint: null };

type Shown = { typed: Typed; errors: FieldErrors };

/** The number and the CVC are never sent back to the browser. */
function isRepeated(name: FieldName): boolean {
  return name !== 'card' && name !== 'cvc';
}

function input({ name, label, autocomplete, kind, hint }: Field, { typed, errors }: Shown): Html {
  const error = errors[name];
  const described = [hint === null ? '' : `${name}-hint`, error === undefined ? '' : `${name}-error`].join(' ').trim();
  return html`<div class="field">
    <label for="${name}">${label}</label>
    <input
      id="${name}"
      name="${name}"
      type="${name === 'email' ? 'email' : 'text'}"
      inputmode="${kind}"
      autocomplete="${autocomplete}"
      value="${isRepeated(name) ? (typed[name] ?? '') : ''}"
      aria-invalid="${error === undefined ? 'false' : 'true'}"
      aria-describedby="${described}"
      required
    />
    ${hint === null ? null : html`<p class="hint" id="${name}-hint">${hint}</p>`}
    ${error === undefined ? null : html`<p class="error" id="${name}-error">${error}</p>`}
  </div>`;
}

function emailPart(session: Stripe.Checkout.Session, shown: Shown): Html {
  const email = session.customer_details?.email ?? null;
  if (email === null) return input(emailField, shown);
  return html`<p class="field"><span class="tag">E-mail</span><br />${email}</p>`;
}

function cardList(): Html {
  const rows = testCards.map(
    (card) =>
      html`<dt>${card.number.replace(/(\d{4})(?=\d)/g, '$1 ')}</dt>
        <dd>${card.effect}</dd>`,
  );
  return html`<details>
    <summary>Card numbers for testing</summary>
    <p class="hint">Any month to come and any three figures go with them. A real card is refused and not kept.</p>
    <dl>${rows}</dl>
  </details>`;
}

function problemBox(errors: FieldErrors): Html | null {
  const count = Object.keys(errors).length;
  if (count === 0) return null;
  const lead = count === 1 ? 'Nothing was charged.' : 'Nothing was charged: some fields are not right yet.';
  const only = count === 1 ? Object.values(errors)[0] : null;
  return html`<div class="problem" role="alert">${only ? html`${only} ` : null}${lead}</div>`;
}

/** The form, with what was typed and what is wrong with it. */
export function paymentPage(record: CheckoutRecord, shown: Shown): Html {
  const { session } = record;
  const total = price(session.amount_total, session.currency);
  const back = session.cancel_url;
  return html`<h1>Pay by card</h1>
    <p class="total">${total}</p>
    ${problemBox(shown.errors)} ${basket(record)}
    <form method="post" action="/pay/${session.id}" novalidate>
      <input type="hidden" name="formId" value="${randomText(16)}" />
      ${emailPart(session, shown)} ${input(numberField, shown)}
      <div class="pair">${input(expiryField, shown)} ${input(cvcField, shown)}</div>
      ${input(nameField, shown)}
      ${session.custom_text.submit ? html`<p class="hint">${session.custom_text.submit.message}</p>` : null}
      <button type="submit">Pay ${total}</button>
    </form>
    ${back === null ? null : html`<p><a href="${back}">Go back without paying</a></p>`} ${cardList()}`;
}

export function authenticationPage(intent: Stripe.PaymentIntent): Html {
  return html`<h1>Your bank asks whether this is you</h1>
    <p class="total">${price(intent.amount, intent.currency)}</p>
    <form method="post" action="/authenticate/${intent.id}">
      <p>This page plays your bank. Choose what it shall answer.</p>
      <button type="submit" name="answer" value="complete">Complete</button>
      <button type="submit" name="answer" value="fail" class="second">Fail</button>
    </form>`;
}

export function notice(title: string, text: string, link: { href: string; label: string } | null): Html {
  return html`<h1>${title}</h1>
    <p>${text}</p>
    ${link === null ? null : html`<p><a href="${link.href}">${link.label}</a></p>`}`;
}
