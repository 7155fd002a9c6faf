/**
 * Something to tell the painter about an answer: a code, the figure found, and the limit it was held against. The sentence,
 * its language and its units belong to whoever shows it.
 */
export type Finding<Code extends string> = { code: Code; value: number; limit: number };

/**
 * How far a figure can be trusted: `published` in a source named beside it, `from-memory` (a default to be edited, never
 * quoted as a standard), or `common-practice` of the trade without a source.
 */
export type Mark = 'published' | 'from-memory' | 'common-practice';
