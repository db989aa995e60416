import { drawSheet, type SheetPaper } from './sheet-paper';

export default (paper: SheetPaper): Promise<Uint8Array> => drawSheet(paper);
