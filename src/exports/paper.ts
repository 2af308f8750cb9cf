/** Paper that a printer takes; the names are those of the sheets they are. */
export type PaperId = 'a4' | 'letter';
