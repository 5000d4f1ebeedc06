/** Invented numbers, so that somebody can see what the page does before a file is at hand. */
export const INVENTED_STANDARDS = `level_ppb,signal_nA
50,1.31
50,1.28
100,1.94
100,1.89
250,3.71
250,3.80
500,6.92
500,6.85
1000,13.1
1000,13.0
2000,25.4
2000,25.7
`

export const INVENTED_BLANKS = `kind,signal_nA
blank,0.71
blank,0.66
blank,0.69
blank,0.74
blank,0.68
blank,0.70
low,0.95
low,0.91
low,0.98
low,0.93
low,0.97
low,0.94
`
