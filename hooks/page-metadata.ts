import type { Metadata } from 'expo-server';
import { publicOrigin } from './env.ts';

type Page = {
  title: string;
  description?: string;
  /** Private pages and those that do not exist stay out of search engines. */
  hidden?: boolean;
  /** Path of the page when several addresses lead to it. */
  path?: string;
};

/** Title, description, canonical address and what is shown when a link is shared. */
export function pageMetadata(request: { url: string }, page: Page): Metadata {
  const url = new URL(request.url);
  const canonical = new URL(page.path ?? url.pathname, publicOrigin()).href;
  if (page.hidden) return { title: page.title, robots: { index: false, follow: false } };
  return {
    title: page.title,
    ...(page.description ? { description: page.description } : {}),
    alternates: { canonical },
    openGraph: {
      title: page.title,
      ...(page.description ? { description: page.description } : {}),
      url: canonical,
      type: 'website',
      locale: 'en_GB',
      siteName: 'Skelderwick Farm',
      images: {
        url: new URL('/share.png', canonical).href,
        width: 1200,
        height: 630,
        alt: 'Skelderwick Farm: a rail of beef, each cut with its place',
      },
    },
    twitter: { card: 'summary_large_image' },
  };
}
