/** Methods in words, as screens and reports name them, with their source. */
export const METHODS = {
  delong: { name: 'DeLong', source: 'DeLong, DeLong & Clarke-Pearson 1988, Biometrics 44:837' },
  delongLogit: { name: 'DeLong, logit scale', source: 'DeLong et al 1988; Pepe 2003' },
  clustered: {
    name: 'Obuchowski, subjects as clusters',
    source: 'Obuchowski 1997, Biometrics 53:567',
  },
  newcombeArea: { name: 'Newcombe, method 5', source: 'Newcombe 2006, Stat Med 25:559' },
  bootstrap: { name: 'bootstrap, percentile', source: 'Efron & Tibshirani 1993' },
  wilson: { name: 'Wilson', source: 'Wilson 1927, J Am Stat Assoc 22:209' },
  clopperPearson: { name: 'Clopper–Pearson', source: 'Clopper & Pearson 1934, Biometrika 26:404' },
  likelihoodRatio: {
    name: 'log method (Simel)',
    source: 'Simel et al 1991, J Clin Epidemiol 44:763',
  },
  oddsRatio: { name: 'log method (Woolf)', source: 'Woolf 1955, Ann Hum Genet 19:251' },
  predictiveValue: {
    name: 'logit method (Mercaldo)',
    source: 'Mercaldo, Lau & Zhou 2007, Stat Med 26:2170',
  },
  limitsExact: {
    name: 'exact, noncentral t (Carkeet)',
    source: 'Carkeet 2015, Optom Vis Sci 92:e71',
  },
  limits1999: {
    name: 'approximate (Bland & Altman 1999)',
    source: 'Bland & Altman 1999, Stat Methods Med Res 8:135',
  },
  limits1986: {
    name: 'approximate (Bland & Altman 1986)',
    source: 'Bland & Altman 1986, Lancet i:307',
  },
} as const satisfies Record<string, { name: string; source: string }>
