import { useServerDocumentContext } from 'expo-router/html';
import type { ReactNode } from 'react';
import { railCss } from '#components/rail/rail-css.ts';
import { controlCss } from '#components/theme/control-css.ts';
import { fontCss, fontPreloads } from '#components/theme/font-css.ts';
import { kitCss } from '#components/theme/kit-css.ts';
import { layoutCss } from '#components/theme/layout-css.ts';
import { shellCss } from '#components/theme/shell-css.ts';
import { shopCss } from '#components/theme/shop-css.ts';
import { themeCss } from '#components/theme/theme-css.ts';
import { schemeScript } from '#components/theme/use-theme.ts';

const css = fontCss + themeCss + layoutCss + controlCss + kitCss + shellCss + shopCss + railCss;

/** The document around every page. It runs on the server only. */
export default function Html({ children }: { children: ReactNode }) {
  const { htmlAttributes, bodyAttributes, headNodes, bodyNodes } = useServerDocumentContext();
  return (
    <html lang="en-GB" {...htmlAttributes}>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="theme-color" content="#FBF6F1" media="(prefers-color-scheme: light)" />
        {fontPreloads.map((href) => (
          <link key={href} rel="preload" href={href} as="font" type="font/woff2" crossOrigin="anonymous" />
        ))}
        <link rel="icon" href="/favicon.svg" type="image/svg+xml" />
        <style id="wholeside" dangerouslySetInnerHTML={{ __html: css }} />
        <script dangerouslySetInnerHTML={{ __html: schemeScript }} />
        {headNodes}
      </head>
      <body {...bodyAttributes}>
        {children}
        {bodyNodes}
      </body>
    </html>
  );
}
