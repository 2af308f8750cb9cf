export { drawPiece, type PieceDrawingOptions } from './piece';
export { drawFolded, foldedExtent, usualTurn, USUAL_TILT, type FoldedDrawingOptions } from './folded';
export { drawSheet } from './sheet';
export { say, sayParts, showPosition, type SaidPart } from './say';
