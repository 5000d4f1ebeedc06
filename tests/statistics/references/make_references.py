"""Makes the project's own edge-case references: data sets with a fixed seed, and values that numpy and
scipy give by the definitions, written independently of the product (loops over all pairs, library
quantiles and tests). Run: python3 make_references.py   (numpy 2.4.6, scipy 1.17.1, Python 3.11.7)
"""
import csv, itertools, json, math, os
import numpy as np
from scipy import stats

HERE = os.path.dirname(os.path.abspath(__file__))
SOURCE = 'numpy 2.4.6, scipy 1.17.1 (Python 3.11.7)'
Z = stats.norm.ppf(0.975)
TIGHT = {'type': 'relative', 'size': 1e-9, 'floor': 1e-12}
LOOSE = {'type': 'relative', 'size': 1e-7, 'floor': 1e-12}


def plain(value):
    """JSON has no NaN and no Infinity."""
    if isinstance(value, dict):
        return {k: plain(v) for k, v in value.items()}
    if isinstance(value, (list, tuple, np.ndarray)):
        return [plain(v) for v in value]
    if value is None or isinstance(value, (str, bool)):
        return value
    if isinstance(value, (int, np.integer)):
        return int(value)
    value = float(value)
    if math.isnan(value):
        return None
    if math.isinf(value):
        return 'Infinity' if value > 0 else '-Infinity'
    return value


def save_data(name, header, rows):
    with open(os.path.join(HERE, 'data', name + '.csv'), 'w', newline='') as file:
        writer = csv.writer(file, lineterminator='\n')
        writer.writerow(header)
        writer.writerows(rows)


def save_results(name, about, records):
    with open(os.path.join(HERE, 'results', name + '.json'), 'w') as file:
        json.dump({'about': about, 'records': plain(records)}, file, indent=1)
        file.write('\n')


def record(dataset, marker, direction, quantity, method, value, tolerance=TIGHT, source=SOURCE):
    return dict(dataset=dataset, marker=marker, direction=direction, quantity=quantity,
                method=method, value=value, source=source, tolerance=tolerance)


# ---------------------------------------------------------------- ROC

def kernel(present, absent):
    """1, 1/2 or 0 for each pair."""
    d = np.subtract.outer(present, absent)
    return (d > 0) + 0.5 * (d == 0)


def delong(present, absent):
    k = kernel(present, absent)
    v10, v01 = k.mean(axis=1), k.mean(axis=0)
    var = (v10.var(ddof=1) / len(present) + v01.var(ddof=1) / len(absent)
           if min(len(present), len(absent)) > 1 else math.nan)
    return k.mean(), var, v10, v01


def proportion(x, n):
    if n == 0:
        return dict(x=x, n=n, estimate=math.nan, wilson95=None, clopper_pearson95=None)
    test = stats.binomtest(int(x), int(n))
    ends = lambda m: dict(zip(('lower', 'upper'), test.proportion_ci(0.95, m)))
    return dict(x=x, n=n, estimate=x / n, wilson95=ends('wilson'), clopper_pearson95=ends('exact'))


def log_interval(estimate, variance):
    if not (estimate > 0 and math.isfinite(estimate) and math.isfinite(variance)):
        return dict(estimate=estimate, lower=None, upper=None, se_log=None)
    se = math.sqrt(variance)
    return dict(estimate=estimate, lower=math.exp(math.log(estimate) - Z * se),
                upper=math.exp(math.log(estimate) + Z * se), se_log=se)


def over(a, b):
    return a / b if b else (math.inf if a else math.nan)


def two_by_two(tp, fp, fn, tn):
    inv = lambda n: 1 / n if n else math.inf
    se, sp = tp / (tp + fn), tn / (tn + fp)
    se_j = math.sqrt(se * (1 - se) / (tp + fn) + sp * (1 - sp) / (tn + fp))
    h = [c + 0.5 for c in (tp, fp, fn, tn)]
    rows = []
    for prevalence in (0.05, 0.5):
        ppv = over(se * prevalence, se * prevalence + (1 - sp) * (1 - prevalence))
        npv = over(sp * (1 - prevalence), sp * (1 - prevalence) + (1 - se) * prevalence)
        rows.append(dict(prevalence=prevalence, ppv=ppv, npv=npv,
                         ppv_logit_ci95=logit(ppv, over(1 - se, se * (tp + fn)) + over(sp, (1 - sp) * (tn + fp))),
                         npv_logit_ci95=logit(npv, over(se, (1 - se) * (tp + fn)) + over(1 - sp, sp * (tn + fp)))))
    return dict(
        sensitivity=proportion(tp, tp + fn), specificity=proportion(tn, tn + fp),
        ppv=proportion(tp, tp + fp), npv=proportion(tn, tn + fn),
        accuracy=proportion(tp + tn, tp + fp + fn + tn),
        youden_j=dict(estimate=se + sp - 1, wald_lower=se + sp - 1 - Z * se_j,
                      wald_upper=se + sp - 1 + Z * se_j, se=se_j),
        lr_positive=log_interval(over(se, 1 - sp), inv(tp) - 1 / (tp + fn) + inv(fp) - 1 / (fp + tn)),
        lr_negative=log_interval(over(1 - se, sp), inv(fn) - 1 / (tp + fn) + inv(tn) - 1 / (fp + tn)),
        dor=log_interval(over(tp * tn, fp * fn), inv(tp) + inv(fp) + inv(fn) + inv(tn)),
        dor_haldane_half={k: v for k, v in log_interval(h[0] * h[3] / (h[1] * h[2]), sum(1 / c for c in h)).items()
                          if k != 'se_log'},
        at_prevalence=rows)


def logit(p, variance):
    if not (0 < p < 1 and math.isfinite(variance)):
        return None
    centre, half = math.log(p / (1 - p)), Z * math.sqrt(variance)
    return dict(lower=1 / (1 + math.exp(half - centre)), upper=1 / (1 + math.exp(-half - centre)))


def roc_records(dataset, marker, direction, rows):
    known = [(float(r[marker]), int(r['label'])) for r in rows if r[marker] != '']
    sign = 1 if direction == 'higher' else -1
    raw1 = np.array([v for v, l in known if l == 1])
    raw0 = np.array([v for v, l in known if l == 0])
    present, absent = sign * raw1, sign * raw0
    m, n = len(present), len(absent)
    area, var, _, _ = delong(present, absent)
    se = math.sqrt(var)
    out = []
    add = lambda quantity, method, value: out.append(record(dataset, marker, direction, quantity, method, value))
    add('counts', 'complete cases on the marker',
        dict(n=m + n, cases=m, controls=n, missing=len(rows) - m - n, distinct_values=len({v for v, _ in known})))
    described = lambda v: dict(n=len(v), mean=v.mean(), sd=v.std(ddof=1), min=v.min(), q1=np.percentile(v, 25),
                               median=np.median(v), q3=np.percentile(v, 75), max=v.max())
    add('descriptives', 'by label; quartiles by linear interpolation (type 7)',
        dict(cases=described(raw1), controls=described(raw0)))
    add('auc', 'mean of the kernel over all pairs', area)
    add('auc_variance', 'DeLong 1988 from the kernel matrix', var)
    add('auc_se', 'DeLong 1988', se)
    add('auc_ci95_untruncated', 'AUC -/+ z*SE', dict(lower=area - Z * se, upper=area + Z * se))
    add('auc_ci95_truncated', 'AUC -/+ z*SE cut to [0,1]',
        dict(lower=max(0, area - Z * se), upper=min(1, area + Z * se)))
    add('auc_ci95_logit', 'logit scale', logit(area, var / (area * (1 - area)) ** 2) if 0 < area < 1 else None)
    add('auc_test_vs_half', 'z = (AUC-0.5)/SE',
        dict(z=(area - 0.5) / se, p=2 * stats.norm.sf(abs(area - 0.5) / se)) if se else dict(z=None, p=None))
    q1, q2 = area / (2 - area), 2 * area ** 2 / (1 + area)
    add('auc_se_hanley_mcneil', 'Hanley & McNeil 1982', math.sqrt(max(0, (
        area * (1 - area) + (m - 1) * (q1 - area ** 2) + (n - 1) * (q2 - area ** 2)) / (m * n))))
    if len({v for v, _ in known}) > 1:
        u = stats.mannwhitneyu(raw1, raw0, alternative='two-sided', method='asymptotic', use_continuity=False)
        c = stats.mannwhitneyu(raw1, raw0, alternative='two-sided', method='asymptotic', use_continuity=True)
        add('mann_whitney', 'scipy.stats.mannwhitneyu, asymptotic',
            dict(u_cases_raw=u.statistic, u_controls_raw=m * n - u.statistic, u_in_disease_direction=area * m * n,
                 p_two_sided_continuity_corrected=c.pvalue, p_two_sided_uncorrected=u.pvalue))
    cuts = [math.inf] + sorted({float(v) for v in np.concatenate([present, absent])}, reverse=True)
    tp = [int((present >= c).sum()) for c in cuts]
    fp = [int((absent >= c).sum()) for c in cuts]
    mids = [math.inf] + [(a + b) / 2 for a, b in zip(cuts[1:], cuts[2:])] + [-math.inf]
    shown = lambda v: sign * v
    add('roc_coordinates', "column 'threshold': positive if at or beyond the value; 'midpoint' between neighbours",
        dict(threshold=[shown(c) for c in cuts], midpoint=[shown(c) for c in mids], tp=tp, fp=fp,
             sensitivity=[t / m for t in tp], specificity=[1 - f / n for f in fp]))

    def listed(k):
        return dict(threshold=shown(cuts[k]), midpoint=shown(mids[k]), sensitivity=tp[k] / m,
                    specificity=(n - fp[k]) / n, tp=tp[k], fp=fp[k], fn=m - tp[k], tn=n - fp[k])

    j = [t * n - f * m for t, f in zip(tp, fp)]
    best = [k for k in range(len(cuts)) if j[k] == max(j)]
    add('youden', 'all ties, by whole numbers', dict(j=max(j) / (m * n), thresholds=[listed(k) for k in best]))
    d = [((m - t) * n) ** 2 + (f * m) ** 2 for t, f in zip(tp, fp)]
    add('closest_to_0_1', 'all ties, by whole numbers',
        dict(distance_squared=min(d) / (m * n) ** 2, thresholds=[listed(k) for k in range(len(cuts)) if d[k] == min(d)]))
    for name, reached, other, pick in (('sens_at_least_0.90', [10 * t >= 9 * m for t in tp], [n - f for f in fp], -1),
                                       ('spec_at_least_0.90', [10 * (n - f) >= 9 * n for f in fp], tp, 0)):
        ok = [k for k in range(len(cuts)) if reached[k]]
        top = max(other[k] for k in ok)
        ties = [k for k in ok if other[k] == top]
        add(name, 'constrained, by whole numbers', dict(preferred=listed(ties[pick]), all_tied=[listed(k) for k in ties]))
    add('two_by_two_at_youden', 'scipy binomtest for proportions; log, logit and Wald intervals by their formulas',
        [dict(threshold=listed(k)['threshold'], midpoint=listed(k)['midpoint'], tp=tp[k], fp=fp[k], fn=m - tp[k],
              tn=n - fp[k], **two_by_two(tp[k], fp[k], m - tp[k], n - fp[k])) for k in best])
    x, y = np.array(fp) / n, np.array(tp) / m
    raw = 0.0
    for k in range(1, len(x)):
        lo, hi = x[k - 1], min(x[k], 0.1)
        if hi > lo:
            at = lambda t: y[k - 1] + (y[k] - y[k - 1]) * (t - x[k - 1]) / (x[k] - x[k - 1])
            raw += (hi - lo) * (at(lo) + at(hi)) / 2
    add('partial_auc_spec_0.9_1', 'trapezoids over FPR 0..0.1; McClish 1989, undefined below chance',
        dict(raw=raw, mcclish=(1 + (raw - 0.005) / 0.095) / 2 if raw >= 0.005 - 1e-12 else None))
    spread = math.sqrt(raw1.var(ddof=1) + raw0.var(ddof=1))
    logs = None
    if min(raw1.min(), raw0.min()) > 0:
        l1, l0 = np.log(raw1), np.log(raw0)
        ls = math.sqrt(l1.var(ddof=1) + l0.var(ddof=1))
        logs = stats.norm.cdf(sign * (l1.mean() - l0.mean()) / ls) if ls > 1e-12 else None
    add('auc_binormal_moments', 'Phi of the standardised gap',
        dict(raw=stats.norm.cdf(sign * (raw1.mean() - raw0.mean()) / spread) if spread > 1e-12 else None, log=logs))
    return out


def paired_record(dataset, first, second, direction, rows):
    known = [r for r in rows if r[first] != '' and r[second] != '']
    sign = 1 if direction == 'higher' else -1
    pick = lambda c, l: sign * np.array([float(r[c]) for r in known if int(r['label']) == l])
    a, va, a10, a01 = delong(pick(first, 1), pick(first, 0))
    b, vb, b10, b01 = delong(pick(second, 1), pick(second, 0))
    cov = np.cov(a10, b10)[0, 1] / len(a10) + np.cov(a01, b01)[0, 1] / len(a01)
    se = math.sqrt(va + vb - 2 * cov)
    z = (a - b) / se
    return record(dataset, f'{first} vs {second}', direction, 'paired_auc_difference', 'DeLong 1988 from kernel matrices',
                  dict(n=len(known), cases=len(a10), auc1=a, auc2=b, difference=a - b, variance1=va, variance2=vb,
                       covariance=cov, se_difference=se, z=z, p=2 * stats.norm.sf(abs(z)),
                       ci95=dict(lower=a - b - Z * se, upper=a - b + Z * se)))


# ---------------------------------------------------------------- agreement

def limits(d):
    n, bias, sd = len(d), d.mean(), d.std(ddof=1)
    t = stats.t.ppf(0.975, n - 1)
    low, high = bias - Z * sd, bias + Z * sd
    ends = lambda half: dict(lower_limit_ci95=dict(lower=low - half, upper=low + half),
                             upper_limit_ci95=dict(lower=high - half, upper=high + half))
    s1, s2 = math.sqrt(3 / n) * sd, math.sqrt(1 / n + Z * Z / (2 * (n - 1))) * sd
    inner, outer = (stats.nct.ppf(p, n - 1, Z * math.sqrt(n)) / math.sqrt(n) for p in (0.025, 0.975))
    test = stats.ttest_1samp(d, 0)
    return dict(n=n, bias=bias, sd=sd, lower=low, upper=high, bias_se=sd / math.sqrt(n),
                bias_ci95=dict(lower=bias - t * sd / math.sqrt(n), upper=bias + t * sd / math.sqrt(n)),
                bias_t=test.statistic, bias_p=test.pvalue,
                approx_sqrt3=dict(se=s1, **ends(t * s1)), approx_1999=dict(se=s2, **ends(t * s2)),
                approx_1999_with_z=ends(Z * s2),
                exact_noncentral_t=dict(
                    factor_inner=inner, factor_outer=outer,
                    lower_limit_ci95=dict(lower=bias - outer * sd, upper=bias - inner * sd),
                    upper_limit_ci95=dict(lower=bias + inner * sd, upper=bias + outer * sd)))


def principal_axis(x, y):
    """Deming with ratio 1 is the first principal axis."""
    _, _, v = np.linalg.svd(np.column_stack([x - x.mean(), y - y.mean()]))
    slope = v[0, 1] / v[0, 0]
    return y.mean() - slope * x.mean(), slope


def deming(x, y):
    n = len(x)
    full = np.array(principal_axis(x, y))
    pseudo = np.array([n * full - (n - 1) * np.array(principal_axis(np.delete(x, i), np.delete(y, i))) for i in range(n)])
    se = pseudo.std(axis=0, ddof=1) / math.sqrt(n)
    t = stats.t.ppf(0.975, n - 2)
    return [dict(estimate=full[k], jackknife_se=se[k], lower=full[k] - t * se[k], upper=full[k] + t * se[k]) for k in (0, 1)]


def passing_bablok(x, y):
    n, slopes, same, minus = len(x), [], 0, 0
    for i, j in itertools.combinations(range(n), 2):
        dx, dy = x[i] - x[j], y[i] - y[j]
        if dx == 0 and dy == 0:
            same += 1
        elif dx == 0:
            slopes.append(math.copysign(math.inf, dy))
        elif abs(dy / dx + 1) < 1e-9:
            minus += 1
        else:
            slopes.append(dy / dx)
    slopes.sort()
    N, K = len(slopes), sum(s < -1 for s in slopes)
    at = lambda r: slopes[r - 1] if 1 <= r <= N else math.nan
    C = Z * math.sqrt(n * (n - 1) * (2 * n + 5) / 18)
    M1 = round((N - C) / 2)
    M2 = N - M1 + 1
    b = at((N + 1) // 2 + K) if N % 2 else (at(N // 2 + K) + at(N // 2 + 1 + K)) / 2
    lower, upper = at(M1 + K), at(M2 + K)
    cut = lambda s: np.median(y - s * x) if math.isfinite(s) else math.nan
    return dict(slope=dict(estimate=b, lower=lower, upper=upper),
                intercept=dict(estimate=cut(b), lower=cut(upper), upper=cut(lower)),
                n_slopes=N, offset_K=K, excluded_identical_points=same, excluded_slope_minus_1=minus, M1=M1, M2=M2)


def pair_records(dataset, a, b, rows):
    known = [(float(r[a]), float(r[b])) for r in rows if r[a] != '' and r[b] != '']
    x, y = np.array(known).T
    marker, direction = f'{a} - {b}', f'A = {a}, B = {b}'
    d, mean = x - y, (x + y) / 2
    out = []
    add = lambda q, m, v, t=TIGHT: out.append(record(dataset, marker, direction, q, m, v, t))
    add('counts', 'complete pairs', dict(n=len(x), dropped_incomplete=len(rows) - len(x)))
    add('limits_of_agreement', 'numpy, scipy.stats.t and nct', limits(d), LOOSE)
    add('limits_percent', 'numpy, scipy.stats.t and nct', limits(100 * d / mean), LOOSE)
    logs = limits(np.log(x) - np.log(y))
    back = lambda v: {k: math.exp(w) for k, w in v.items()}
    add('limits_log_ratio', 'numpy, scipy.stats.t and nct on logarithms', dict(log_scale=logs, ratio=dict(
        geometric_mean_ratio=math.exp(logs['bias']), lower=math.exp(logs['lower']), upper=math.exp(logs['upper']),
        mean_ci95=back(logs['bias_ci95']),
        lower_limit_ci95_exact=back(logs['exact_noncentral_t']['lower_limit_ci95']),
        upper_limit_ci95_exact=back(logs['exact_noncentral_t']['upper_limit_ci95']))), LOOSE)
    low, high = d.mean() - Z * d.std(ddof=1), d.mean() + Z * d.std(ddof=1)
    add('limits_nonparametric', 'numpy.percentile (type 7)',
        {'p2.5': np.percentile(d, 2.5), 'median': np.median(d), 'p97.5': np.percentile(d, 97.5),
         'n_inside_parametric': int(((d >= low) & (d <= high)).sum())})
    fit = stats.linregress(mean, d)
    add('difference_on_mean', 'scipy.stats.linregress',
        dict(intercept=fit.intercept, intercept_se=fit.intercept_stderr, slope=fit.slope, slope_se=fit.stderr,
             slope_p=fit.pvalue, r_squared=fit.rvalue ** 2), {'type': 'relative', 'size': 1e-6, 'floor': 1e-12})
    w, p = stats.shapiro(d)
    add('shapiro_wilk_differences', 'scipy.stats.shapiro', dict(w=w, p=p), {'type': 'relative', 'size': 1e-4, 'floor': 1e-12})
    r = stats.pearsonr(x, y)
    ci = r.confidence_interval() if len(x) > 3 else (math.nan, math.nan)
    add('correlation', 'scipy.stats.pearsonr and spearmanr',
        dict(r=r.statistic, lower=ci[0], upper=ci[1], r_diff_mean=stats.pearsonr(d, mean).statistic,
             spearman_diff_mean=stats.spearmanr(d, mean).statistic))
    for u, v, n1, n2 in ((x, y, a, b), (y, x, b, a)):
        line = stats.linregress(u, v)
        rsd = math.sqrt(((v - line.intercept - line.slope * u) ** 2).sum() / (len(u) - 2))
        add('regression_ols', f'x = {n1}, y = {n2}; scipy.stats.linregress',
            dict(x=n1, y=n2, intercept=line.intercept, intercept_se=line.intercept_stderr, slope=line.slope,
                 slope_se=line.stderr, residual_sd=rsd))
        i, s = deming(u, v)
        add('regression_deming', f'x = {n1}, y = {n2}; error-variance ratio 1; first principal axis, jackknife',
            dict(x=n1, y=n2, intercept=i, slope=s))
        add('regression_passing_bablok', f'x = {n1}, y = {n2}; Passing & Bablok 1983, all slopes listed',
            dict(x=n1, y=n2, **passing_bablok(u, v)))
    return out


def one_way(groups):
    sizes = np.array([len(g) for g in groups])
    total, n = sizes.sum(), len(groups)
    grand = np.concatenate(groups).mean()
    ssb = sum(len(g) * (np.mean(g) - grand) ** 2 for g in groups)
    ssw = sum(((np.array(g) - np.mean(g)) ** 2).sum() for g in groups)
    m0 = (total ** 2 - (sizes ** 2).sum()) / ((n - 1) * total)
    return n, total, grand, ssb / (n - 1), ssw / (total - n), total - n, m0, sizes


def replicate_records(dataset, a, b, rows):
    direction = f'A = {a}, B = {b}'
    subjects = sorted({r['subject'] for r in rows}, key=int)
    of = lambda c: [g for g in ([float(r[c]) for r in rows if r['subject'] == s and r[c] != ''] for s in subjects) if g]
    out = []
    for column in (a, b):
        groups = of(column)
        n, total, grand, msb, msw, df, m0, _ = one_way(groups)
        sd = math.sqrt(msw)
        _, _, _, _, log_msw, _, _, _ = one_way([np.log(g) for g in groups])
        cvs = [np.var(g, ddof=1) / np.mean(g) ** 2 for g in groups if len(g) > 1]
        out.append(record(dataset, column, direction, 'repeatability', 'one-way analysis of variance by its sums of squares',
                          dict(subjects=n, observations=total, grand_mean=grand, msb=msb, msw=msw, df_between=n - 1,
                               df_within=df, m0=m0, within_subject_sd=sd,
                               within_subject_sd_ci95=dict(lower=math.sqrt(msw * df / stats.chi2.ppf(0.975, df)),
                                                           upper=math.sqrt(msw * df / stats.chi2.ppf(0.025, df))),
                               repeatability_coefficient=Z * math.sqrt(2) * sd, cv_percent=100 * sd / grand,
                               rms_cv_percent=100 * math.sqrt(np.mean(cvs)),
                               cv_log_percent_exp=100 * (math.exp(math.sqrt(log_msw)) - 1),
                               cv_log_percent_lognormal=100 * math.sqrt(math.exp(log_msw) - 1),
                               between_subject_variance=(msb - msw) / m0, icc_1_1=(msb - msw) / (msb + (m0 - 1) * msw))))
    pairs = [g for g in ([float(r[a]) - float(r[b]) for r in rows if r['subject'] == s and r[a] != '' and r[b] != '']
                         for s in subjects) if g]
    n, total, bias, msb, msw, _, m0, _ = one_way(pairs)
    between = max(0, (msb - msw) / m0)
    sd = math.sqrt(between + msw)
    out.append(record(dataset, f'{a} - {b}', direction, 'limits_replicates_true_value_varies', 'Bland & Altman 2007',
                      dict(subjects=n, pairs=total, bias=bias, msb=msb, msw=msw, m0=m0, between_variance=between,
                           within_variance=msw, sd=sd, lower=bias - Z * sd, upper=bias + Z * sd)))
    return out


# ---------------------------------------------------------------- data sets

def make():
    rng = np.random.default_rng(20260101)
    label = (np.arange(60) < 24).astype(int)
    rng.shuffle(label)
    ties = np.clip(np.round(2 + 1.2 * label + rng.normal(0, 1, 60)), 1, 5).astype(int)
    falls = np.round(50 - 6 * label + rng.normal(0, 8, 60))
    separated = np.round(np.where(label == 1, 200, 100) + rng.uniform(0, 50, 60), 1)
    rows = []
    for i in range(60):
        rows.append(dict(id=i + 1, label=label[i], heavy_ties=ties[i], falls='' if i % 11 == 3 else falls[i],
                         separated=separated[i], constant=7))
    save_data('edges-roc', list(rows[0]), [list(r.values()) for r in rows])
    rows = [{k: str(v) for k, v in r.items()} for r in rows]
    records = []
    for marker, direction in (('heavy_ties', 'higher'), ('falls', 'lower'), ('falls', 'higher'),
                              ('separated', 'higher'), ('constant', 'higher')):
        records += roc_records('edges-roc', marker, direction, rows)
    records.append(paired_record('edges-roc', 'heavy_ties', 'separated', 'higher', rows))
    records.append(paired_record('edges-roc', 'heavy_ties', 'falls', 'higher', rows))
    few = [dict(id=k + 1, label=l, gas_ppb=v) for k, (l, v) in
           enumerate([(1, 5.0), (0, 3.0), (1, 3.0), (0, 1.0), (1, 0.5)])]
    save_data('five-subjects', list(few[0]), [list(r.values()) for r in few])
    records += roc_records('five-subjects', 'gas_ppb', 'higher', [{k: str(v) for k, v in r.items()} for r in few])
    save_results('roc-edges', 'Invented: heavy ties, a marker that falls with disease, missing values, perfect '
                 'separation, a constant marker, five subjects', records)

    three = [dict(subject=k + 1, a=v, b=w) for k, (v, w) in enumerate([(10.2, 9.7), (14.9, 15.4), (22.1, 20.3)])]
    save_data('three-pairs', list(three[0]), [list(r.values()) for r in three])
    truth = rng.integers(5, 25, 40)
    whole = [dict(subject=k + 1, a=int(t + rng.integers(-2, 3)), b=int(t + rng.integers(-2, 3)) if k != 7 else '')
             for k, t in enumerate(truth)]
    save_data('whole-numbers', list(whole[0]), [list(r.values()) for r in whole])
    text = lambda rs: [{k: str(v) for k, v in r.items()} for r in rs]
    records = pair_records('three-pairs', 'a', 'b', text(three)) + pair_records('whole-numbers', 'a', 'b', text(whole))
    uneven = []
    for s in range(1, 16):
        level = rng.normal(300, 60)
        for k in range(1, 2 + s % 5):
            a, b = level + rng.normal(0, 12), 1.03 * level + rng.normal(0, 15)
            uneven.append(dict(subject=s, replicate=k, a=round(a, 1), b='' if (s, k) in ((4, 2), (9, 1)) else round(b, 1)))
    save_data('uneven-replicates', list(uneven[0]), [list(r.values()) for r in uneven])
    records += replicate_records('uneven-replicates', 'a', 'b', text(uneven))
    save_results('agreement-edges', 'Invented: three pairs, whole numbers with ties and vertical slopes, '
                 'unequal numbers of replicates with missing readings', records)

    records = []
    for x, n in ((0, 1), (1, 1), (1, 2), (0, 5), (1, 1000000), (999999, 1000000), (50000, 100000), (3, 100000)):
        test = stats.binomtest(x, n)
        ends = lambda method: dict(zip(('lower', 'upper'), test.proportion_ci(0.95, method)))
        records.append(record('none', 'proportion', 'none', 'proportion_ci95', 'scipy binomtest.proportion_ci',
                              dict(x=x, n=n, estimate=x / n, wilson=ends('wilson'), wilson_continuity=ends('wilsoncc'),
                                   clopper_pearson=ends('exact'))))
    for b, c in ((0, 3), (7, 7), (1, 0), (40, 12), (300, 250)):
        test = stats.binomtest(b, b + c, 0.5)
        mass = stats.binom.pmf(min(b, c), b + c, 0.5)
        mid = 1 - mass / 2 if b == c else 2 * stats.binom.cdf(min(b, c), b + c, 0.5) - mass
        records.append(record('none', 'paired proportions', 'none', 'newcombe_paired',
                              'McNemar only: scipy binomtest for the exact p, mid-p from the mass, chi-squared',
                              dict(both_positive=10, first_only=b, second_only=c, both_negative=20,
                                   difference=(b - c) / (b + c + 30), mcnemar_exact_p=test.pvalue, mcnemar_midp=mid,
                                   mcnemar_chi2=(b - c) ** 2 / (b + c), mcnemar_p=stats.chi2.sf((b - c) ** 2 / (b + c), 1))))
    save_results('proportions-edges', 'Proportions at the ends and with very large counts', records)


make()
