/** Methods of agreement and precision in words, as screens and reports name them, with their source. */
export const AGREEMENT_METHODS = {
  t: { name: 't distribution', source: 'Bland & Altman 1986, Lancet i:307' },
  tSubjects: {
    name: 't distribution, subjects’ means',
    source: 'Bland & Altman 1999, Stat Methods Med Res 8:135, section 5',
  },
  varying: {
    name: 'true value varies, MOVER (Zou)',
    source: 'Bland & Altman 2007, J Biopharm Stat 17:571; Zou 2013, Stat Methods Med Res 22:630',
  },
  constant: {
    name: 'true value constant, MOVER (Zou)',
    source: 'Bland & Altman 1999, section 5; Zou 2013, Stat Methods Med Res 22:630',
  },
  regression: {
    name: 'regression on the mean, delta method',
    source: 'Bland & Altman 1999, Stat Methods Med Res 8:135, section 3.2',
  },
  orderStatistics: {
    name: 'order statistics, binomial',
    source:
      'Bland & Altman 1999, section 4; Conover 1999, Practical Nonparametric Statistics, section 3.2',
  },
  ordinary: { name: 'least squares, t(n − 2)', source: 'Draper & Smith 1998, ch. 1' },
  deming: {
    name: 'Deming, jackknife',
    source: 'Linnet 1990, Stat Med 9:1463; 1993, Clin Chem 39:424',
  },
  passingBablok: {
    name: 'Passing–Bablok',
    source: 'Passing & Bablok 1983, J Clin Chem Clin Biochem 21:709',
  },
  lin: {
    name: 'Lin, Fisher’s z',
    source: 'Lin 1989, Biometrics 45:255, corrected 2000, Biometrics 56:324',
  },
  pearson: { name: 'Pearson, Fisher’s z', source: 'Fisher 1921, Metron 1:3' },
  spearman: {
    name: 'Spearman, Fisher’s z',
    source: 'Spearman 1904, Am J Psychol 15:72; Bonett & Wright 2000, Psychometrika 65:23',
  },
  withinSubject: {
    name: 'one-way analysis of variance, chi-squared',
    source: 'Bland & Altman 1996, BMJ 313:744',
  },
  intraclass: {
    name: 'F distribution (McGraw & Wong)',
    source: 'Shrout & Fleiss 1979, Psychol Bull 86:420; McGraw & Wong 1996, Psychol Methods 1:30',
  },
  corrected: {
    name: 'area freed from measurement error',
    source: 'Reiser 2000, Stat Med 19:2115; Faraggi 2000, Stat Med 19:61',
  },
} as const satisfies Record<string, { name: string; source: string }>
