const latin =
  'U+0020-007E,U+00A0-00FF,U+0131,U+0152-0153,U+2009,U+2013-2014,U+2018-201A,U+201C-201E,U+2022,U+2026,U+202F,U+2032-2033,U+2044,U+20AC,U+2122,U+2212';

function face(family: string, weight: number, file: string): string {
  return `@font-face{font-family:'${family}';font-style:normal;font-weight:${weight};font-display:swap;src:url('/fonts/${file}') format('woff2');unicode-range:${latin}}`;
}

/** The files are served for a year without asking again: a changed file gets a new revision in its name. */
const faces = [
  face('Besley', 700, 'besley-700-r1.woff2'),
  face('Besley', 800, 'besley-800-r1.woff2'),
  face('Public Sans', 400, 'public-sans-400-r1.woff2'),
  face('Public Sans', 600, 'public-sans-600-r1.woff2'),
  face('Public Sans', 700, 'public-sans-700-r1.woff2'),
];

// The stand-ins are stretched to the width and height of our letters, so that nothing moves when ours arrive.
const standIns = `
@font-face{font-family:'Public Sans stand-in';src:local('Arial'),local('Liberation Sans'),local('Helvetica');size-adjust:105.5%;ascent-override:90%;descent-override:21.3%;line-gap-override:0%}
@font-face{font-family:'Besley stand-in';font-weight:700 800;src:local('Times New Roman Bold'),local('Liberation Serif Bold'),local('Georgia Bold');size-adjust:127%;ascent-override:98.4%;descent-override:33.5%;line-gap-override:0%}
`;

export const fontCss = faces.join('\n') + standIns;

/** Wanted by the first paint of every page; each is preloaded as `font/woff2` with `crossorigin`. */
export const fontPreloads = ['/fonts/besley-700-r1.woff2', '/fonts/public-sans-400-r1.woff2'] as const;
