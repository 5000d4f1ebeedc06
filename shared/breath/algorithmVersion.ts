/** Stored with every result; raised whenever a trace may get another answer than before. */
export const algorithmVersion = 1
