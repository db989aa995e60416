export type ThemeName = 'light' | 'dusk';

const light = {
  paper: '#FAF7F0', // the page
  sheet: '#FFFFFF', // cards and forms
  rule: '#DAD3C4', // hairlines that only divide
  edge: '#7F786A', // outlines of controls, 3:1 on paper and sheet
  ink: '#1B2423', // text
  inkSoft: '#55605D', // secondary text
  water: '#1F5661', // links, what is selected
  waterTint: '#E2EDEE', // ground of what is selected
  float: '#C8451B', // the one main action, "you are here"
  floatTint: '#FBEBE3', // ground of "you are here"
  onFloat: '#FFFFFF', // text on float
  reed: '#48682F', // fine, done, free
  reedTint: '#EAF0E2',
  amber: '#8A5A00', // caution, held
  amberTint: '#FAEFD9',
  brick: '#9B2226', // danger, closed, error
  brickTint: '#F9E5E3',
  onBrick: '#FFFFFF', // text on brick
};

export type Colours = Readonly<Record<keyof typeof light, string>>;

const dusk: Colours = {
  paper: '#12181A',
  sheet: '#1A2326',
  rule: '#2F3B3F',
  edge: '#76858A',
  ink: '#EDE8DC',
  inkSoft: '#A9B3AE',
  water: '#7FB9C2',
  waterTint: '#22363B',
  float: '#FF8A5C',
  floatTint: '#3A2A22',
  onFloat: '#12181A',
  reed: '#A6C98A',
  reedTint: '#25311F',
  amber: '#E9B44C',
  amberTint: '#352C18',
  brick: '#FF8C86',
  brickTint: '#3A2322',
  onBrick: '#12181A',
};

/** Every colour in the program, by theme. Dusk is for a dark bank: paper and ink change places. */
export const colours: Readonly<Record<ThemeName, Colours>> = { light, dusk };
