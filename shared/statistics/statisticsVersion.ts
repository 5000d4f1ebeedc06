/**
 * Version of the statistics, stored with every analysis. Raise it with any change that can move a
 * number: the first figure for another method, the second for an addition, the third for a repair.
 */
export const statisticsVersion = '1.0.0'
