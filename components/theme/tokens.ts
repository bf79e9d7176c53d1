/** Raw colours. Screens and parts never use these: they use the roles of theme.ts. */
export const lightPalette = {
  paper: '#FBF6F1',
  deepPaper: '#F1E6DA',
  hairline: '#D9CDBF',
  fence: '#85796D',
  ink: '#1E1A18',
  quietInk: '#5A514B',
  raddle: '#A8341F',
  deepRaddle: '#7F2415',
  chalk: '#FFF8F2',
  pasture: '#2E5E41',
  pastureTint: '#DCE8DA',
  pastureEdge: '#5F8A6B',
  straw: '#F0D48A',
  strawHatch: '#B98417',
  strawText: '#7A5607',
} as const;

/** The same family by lamplight, for the cold room and for those who ask for it. */
export const darkPalette = {
  paper: '#171311',
  deepPaper: '#241D19',
  hairline: '#453A33',
  fence: '#8E8176',
  ink: '#F4EAE0',
  quietInk: '#BBADA1',
  raddle: '#BE4730',
  lampRaddle: '#F0917A',
  deepRaddle: '#C24B33',
  chalk: '#FFF8F2',
  pasture: '#93C9A5',
  pastureTint: '#22382B',
  pastureEdge: '#6BA582',
  straw: '#5A4412',
  strawHatch: '#D9A640',
  strawText: '#E9C46C',
} as const;

/** Widths in pixels at which the layout changes; container queries of the table and the rail have their own. */
export const breakpoints = { wide: 760, office: 1000 } as const;
