/** The name under which a browser keeps its reader's sheets. */
export const KEPT_AS = 'foldwright:my-sheets';
