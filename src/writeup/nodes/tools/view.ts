import { wordedBlockView } from '../worded-block';

export const toolsView = () => wordedBlockView({ className: 'materials', word: 'Tools', wordClass: 'materials-word' });
