export { drawPiece, type PieceDrawingOptions } from './piece';
export { drawFolded, foldedExtent, type FoldedDrawingOptions } from './folded';
export { say, sayParts, type SaidPart } from './say';
