import type Stripe from 'stripe';
import { buildCustomer } from '../objects/customer.ts';
import type { Fake } from '../fake.ts';
import type { Handler } from './endpoint.ts';
import { noSuchObject } from './faults.ts';
import { listPage, readCreated, readFilter } from './lists.ts';

export function retrieveCharge(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const charge = fake.store.charges.get(id);
    if (!charge) throw noSuchObject('charge', id);
    return charge;
  };
}

export function listCharges(fake: Fake): Handler {
  return ({ params }) => {
    const filters = [readCreated(params), readFilter(params, 'payment_intent'), readFilter(params, 'customer')];
    const found = [...fake.store.charges.values()].reverse().filter((charge) => filters.every((is) => is(charge)));
    const page = listPage(found, params, '/v1/charges');
    params.refuseUnknown();
    return page;
  };
}

export function createCustomer(fake: Fake): Handler {
  return ({ params }) => {
    const plan = {
      created: fake.now(),
      email: params.text('email'),
      name: params.text('name'),
      phone: params.text('phone'),
      description: params.text('description'),
      metadata: params.metadata(),
    };
    params.refuseUnknown();
    const customer = buildCustomer(plan);
    fake.store.customers.set(customer.id, customer);
    fake.store.changed();
    return customer;
  };
}

export function retrieveCustomer(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const customer = fake.store.customers.get(id);
    if (!customer) throw noSuchObject('customer', id);
    return customer;
  };
}

export function listCustomers(fake: Fake): Handler {
  return ({ params }) => {
    const filters = [readCreated(params), readFilter(params, 'email')];
    const found = [...fake.store.customers.values()].reverse().filter((one) => filters.every((is) => is(one)));
    const page = listPage(found, params, '/v1/customers');
    params.refuseUnknown();
    return page;
  };
}

export function retrieveCard(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const record = fake.store.cards.get(id);
    if (!record) throw noSuchObject('PaymentMethod', id);
    return record.method;
  };
}

/** The saved cards of one customer. */
export function listCards(fake: Fake): Handler {
  return ({ params }) => {
    const customer = params.text('customer');
    const ofType = readFilter(params, 'type');
    const methods = [...fake.store.cards.values()].map((record) => record.method).reverse();
    const own = methods.filter((method) => customer !== null && method.customer === customer && ofType(method));
    const page = listPage(own, params, '/v1/payment_methods');
    params.refuseUnknown();
    return page;
  };
}

function withPending(fake: Fake, event: Stripe.EventBase): Stripe.EventBase {
  const waiting = [...fake.store.deliveries.values()].filter((delivery) => delivery.eventId === event.id);
  return { ...event, pending_webhooks: waiting.length > 0 ? 1 : 0 };
}

export function retrieveEvent(fake: Fake): Handler {
  return ({ params, id }) => {
    params.refuseUnknown();
    const event = fake.store.events.get(id);
    if (!event) throw noSuchObject('event', id);
    return withPending(fake, event);
  };
}

export function listEvents(fake: Fake): Handler {
  return ({ params }) => {
    const types = params.texts('types');
    const filters = [readCreated(params), readFilter(params, 'type')];
    const found = [...fake.store.events.values()]
      .reverse()
      .filter((event) => filters.every((is) => is(event)) && (types.length === 0 || types.includes(event.type)));
    const page = listPage(found, params, '/v1/events');
    params.refuseUnknown();
    return { ...page, data: page.data.map((event) => withPending(fake, event)) };
  };
}
