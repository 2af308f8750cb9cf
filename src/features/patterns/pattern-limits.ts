/** The longest pattern file that is looked at; the largest of our own has about a tenth of it. */
export const PATTERN_BYTES = 512 * 1024;

/** Where the published schema of pattern files stands. */
export const SCHEMA_PATH = '/pattern.schema.json';
