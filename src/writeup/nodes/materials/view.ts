import { wordedBlockView } from '../worded-block';

export const materialsView = () =>
  wordedBlockView({ className: 'materials', word: 'Materials', wordClass: 'materials-word' });
