import { afterEach, describe, expect, it, vi } from 'vitest';
import { placeAfterSignIn } from '#hooks/account.ts';
import { load } from '#hooks/loaded.ts';
import { pageMetadata } from '#hooks/page-metadata.ts';
import { getBox } from '#shared/contracts/shop.ts';
import type { ErrorCode } from '#shared/errors.ts';
import { makeBox } from '#tests/support/make-shop.ts';

afterEach(() => vi.unstubAllGlobals());

function answerWith(response: () => Promise<Response>): void {
  vi.stubGlobal('fetch', vi.fn(response));
}

function refusal(code: ErrorCode, status: number): Response {
  return Response.json({ code, detail: 'No.' }, { status, headers: { 'content-type': 'application/problem+json' } });
}

const loadBox = () => load(getBox, { params: { slug: 'ember' } });

describe('loading a page', () => {
  it('with an answer, brings the figures and when they were fetched', async () => {
    answerWith(() => Promise.resolve(Response.json(makeBox())));
    const loaded = await loadBox();
    expect(loaded).toMatchObject({ state: 'ready', data: { slug: 'ember' } });
  });

  it('of something that does not exist, is missing', async () => {
    answerWith(() => Promise.resolve(refusal('NOT_FOUND', 404)));
    expect(await loadBox()).toEqual({ state: 'missing' });
  });

  it('with an address that cannot be, is missing too', async () => {
    answerWith(() => Promise.resolve(refusal('INVALID_INPUT', 400)));
    expect(await loadBox()).toEqual({ state: 'missing' });
  });

  it('while the farm does not answer, has failed', async () => {
    answerWith(() => Promise.reject(new TypeError('fetch failed')));
    expect(await loadBox()).toEqual({ state: 'failed' });
    answerWith(() => Promise.resolve(refusal('INTERNAL', 500)));
    expect(await loadBox()).toEqual({ state: 'failed' });
  });
});

describe('where signing in leads', () => {
  it('without a wish, to the place of the role', () => {
    expect(
      ['customer', 'butcher', 'packer', 'owner'].map((role) => placeAfterSignIn(undefined, role as 'owner')),
    ).toEqual(['/account', '/trade', '/office', '/office']);
  });

  it('with a wish, to that place of this site', () => {
    expect(placeAfterSignIn('/office/herd?sort=age', 'owner')).toBe('/office/herd?sort=age');
  });

  it.each(['//evil.example.com', '/\\evil.example.com', 'https://evil.example.com', 'javascript:alert(1)', ''])(
    'to another site (%s), never',
    (next) => {
      expect(placeAfterSignIn(next, 'customer')).toBe('/account');
    },
  );
});

describe('the words about a page', () => {
  it('public, carry an absolute canonical address without its query', () => {
    const metadata = pageMetadata({ url: 'http://127.0.0.1:8080/boxes/ember?from=mail' }, { title: 'Ember' });
    expect(metadata.alternates?.canonical).toBe('http://127.0.0.1:8080/boxes/ember');
  });

  it('private, keep out of search engines', () => {
    const metadata = pageMetadata({ url: 'http://127.0.0.1:8080/orders/x' }, { title: 'Your order', hidden: true });
    expect(metadata).toEqual({ title: 'Your order', robots: { index: false, follow: false } });
  });
});
