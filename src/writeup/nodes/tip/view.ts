import { wordedBlockView } from '../worded-block';

export const tipView = () => wordedBlockView({ className: 'tip', word: 'Tip', wordClass: 'note-word' });
