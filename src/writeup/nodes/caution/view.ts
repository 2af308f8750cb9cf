import { wordedBlockView } from '../worded-block';

export const cautionView = () =>
  wordedBlockView({ className: 'caution', word: 'Caution', wordClass: 'note-word', icon: 'warning' });
