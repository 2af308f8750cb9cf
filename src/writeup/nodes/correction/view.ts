import { wordedBlockView } from '../worded-block';

export const correctionView = () =>
  wordedBlockView({ className: 'correction', word: 'Corrected', wordClass: 'note-word', icon: 'pencil' });
