/** The methods of the planning page in words, with their source; those of results are in METHODS. */
export const PLANNING_METHODS = {
  hanleyMcNeil: { name: 'Hanley & McNeil', source: 'Hanley & McNeil 1982, Radiology 143:29' },
  binormal: {
    name: 'Binormal variance (Obuchowski)',
    source: 'Obuchowski 2004, Acad Radiol 11:1178',
  },
  twoAreas: {
    name: 'Obuchowski & McClish',
    source: 'Obuchowski & McClish 1997, Stat Med 16:1529',
  },
  buderer: { name: 'Buderer', source: 'Buderer 1996, Acad Emerg Med 3:895' },
  exactFloor: {
    name: 'Exact binomial power',
    source:
      'Flahault, Cadilhac & Thomas 2005, J Clin Epidemiol 58:859; Chu & Cole 2007, ibid. 60:1201',
  },
  coPrimary: { name: 'Co-primary measures', source: 'Offen et al 2007, Drug Inf J 41:19' },
  wilson: { name: 'Wilson interval', source: 'Wilson 1927, J Am Stat Assoc 22:209' },
  clopperPearson: {
    name: 'Clopper–Pearson interval',
    source: 'Clopper & Pearson 1934, Biometrika 26:404',
  },
  limits1986: {
    name: 'Bland & Altman 1986, ±z·√(3/n) SD',
    source: 'Bland & Altman 1986, Lancet i:307',
  },
  limits1999: {
    name: 'Bland & Altman 1999',
    source: 'Bland & Altman 1999, Stat Methods Med Res 8:135',
  },
  newcombeIndependent: {
    name: 'Newcombe, methods 10 and 11',
    source: 'Newcombe 1998, Stat Med 17:873',
  },
  newcombePaired: { name: 'Newcombe, methods 8 and 10', source: 'Newcombe 1998, Stat Med 17:2635' },
  mcnemar: {
    name: 'McNemar, mid-p',
    source:
      'McNemar 1947, Psychometrika 12:153; Fagerland, Lydersen & Laake 2013, BMC Med Res Methodol 13:91',
  },
  measurementError: {
    name: 'Normal values with normal error',
    source: 'Coffin & Sukhatme 1997, Biometrics 53:823; Reiser 2000, Stat Med 19:2115',
  },
  correctedArea: {
    name: 'Correction on the probit scale',
    source: 'Faraggi 2000, Stat Med 19:61; Reiser 2000, Stat Med 19:2115',
  },
  spearmanBrown: {
    name: 'Spearman–Brown',
    source: 'Spearman 1910, Br J Psychol 3:271; Brown 1910, ibid. 3:296',
  },
  belowDetection: {
    name: 'Numerical integration over normal values',
    source:
      'Perkins, Schisterman & Vexler 2007, Am J Epidemiol 165:325; Mumford et al 2006, Biostatistics 7:585',
  },
} as const satisfies Record<string, { name: string; source: string }>
export type PlanningMethod = keyof typeof PLANNING_METHODS
