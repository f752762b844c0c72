package repl

import "example.com/dosewright/euv"

// statisticsRows: rare failures, exact tails, yield and limits of rates.
func statisticsRows() []Function {
	const section = resistSection
	const digits = "ten digits down to 1e-300"
	const exact = "definition of the distribution; computed after Loader (2000)"
	const gehrels = "Gehrels, Astrophys. J. 303, 336 (1986), equations 1 and 2"
	mean := "mean: expected number of photons (or acids, electrons) in the feature"
	threshold := "threshold: as a fraction of the mean, such as 0.5: so many photons or fewer leave it shut"
	above := "threshold: as a multiple of the mean, such as 1.5: so many photons or more open it"
	tail := []string{mean, threshold}
	events := []string{"count: whole number", "mean: expected number of events"}
	rate := []string{
		"events: whole number seen, perhaps 0", "trials: whole number looked at", "confidence: such as 95 %",
		"sides: 1 for a limit on one side alone, 2 for an end of an interval: 23 % apart at no event and 95 %",
	}
	return []Function{
		BindWarned2(Row{
			Name: "missing_probability", Section: section, Summary: "probability that a feature stays shut which should open",
			Args: tail, Formula: "P(X ≤ ⌊t N⌋), Poisson", Valid: digits + "; below log10_missing_probability", Source: exact,
			Example: "missing_probability(200, 0.5)",
		}, euv.MissingProbability),
		Bind2(Row{
			Name: "log10_missing_probability", Section: section, Summary: "decadic logarithm of missing_probability",
			Args: tail, Formula: "log10 P(X ≤ ⌊t N⌋), Poisson", Valid: "mean > 0; also where the probability is too small to hold", Source: exact,
			Example: "log10_missing_probability(9000, 0.5)",
		}, euv.Log10MissingProbability),
		BindWarned2(Row{
			Name: "merging_probability", Section: section, Summary: "probability that a feature opens which should stay shut",
			Args: []string{mean, above}, Formula: "P(X ≥ ⌈t N⌉), Poisson", Valid: digits + "; below log10_merging_probability", Source: exact,
			Example: "merging_probability(200, 1.5)",
		}, euv.MergingProbability),
		Bind2(Row{
			Name: "log10_merging_probability", Section: section, Summary: "decadic logarithm of merging_probability",
			Args: []string{mean, above}, Formula: "log10 P(X ≥ ⌈t N⌉), Poisson", Valid: "mean > 0; also where the probability is too small to hold", Source: exact,
			Example: "log10_merging_probability(9000, 1.5)",
		}, euv.Log10MergingProbability),
		Bind2(Row{
			Name: "mean_for_failure", Section: section, Summary: "smallest whole mean from which on missing_probability stays in a limit",
			Args: []string{threshold, "probability: of a failure that is allowed, a feature"}, Formula: "P(X ≤ ⌊t N′⌋) ≤ p for all whole N′ ≥ N", Valid: "threshold 0 to 0.999; single smaller means may hold too", Source: exact,
			Example: "mean_for_failure(0.5, 1e-10)",
		}, euv.MeanForFailure),
		BindWarned2(Row{
			Name: "poisson_at_most", Section: section, Summary: "probability of count events or fewer",
			Args: events, Formula: "Σ e^(−m) m^j / j!, j = 0 … count", Valid: digits, Source: exact,
			Example: "poisson_at_most(3, 5)",
		}, euv.PoissonAtMost),
		BindWarned2(Row{
			Name: "poisson_at_least", Section: section, Summary: "probability of count events or more",
			Args: events, Formula: "Σ e^(−m) m^j / j!, j = count …", Valid: digits, Source: exact,
			Example: "poisson_at_least(300, 200)",
		}, euv.PoissonAtLeast),
		BindWarned3(Row{
			Name: "binomial_at_least", Section: section, Summary: "probability of count successes or more in independent trials",
			Args: []string{"count: whole number", "trials: whole number", "p: probability that one trial succeeds"}, Formula: "Σ C(n, j) p^j (1 − p)^(n−j), j = count … n", Valid: digits, Source: exact,
			Example: "binomial_at_least(2, 1000, 0.05 %)",
		}, euv.BinomialAtLeast),
		BindWarned1(Row{
			Name: "normal_above", Section: section, Summary: "probability that a normal deviate lies above z, on one side",
			Args: []string{"z: in standard deviations"}, Formula: "½ erfc(z/√2)", Valid: digits + "; no good for rare counts: see poisson_at_most", Source: "definition of the distribution",
			Example: "normal_above(3)",
		}, euv.NormalAbove),
		Bind1(Row{
			Name: "normal_quantile", Section: section, Summary: "standard deviations below which a normal deviate lies with probability p",
			Args: []string{"p: of lying below, on one side"}, Formula: "p = ½ erfc(−z/√2), solved for z", Valid: "0 < p < 1", Source: "Wichura, Applied Statistics 37, 477 (1988)",
			Example: "normal_quantile(97.5 %)",
		}, euv.NormalQuantile),
		Bind2(Row{
			Name: "failures", Section: section, Summary: "mean number of failures among many features",
			Args: []string{"probability: of one feature", "features: how many there are"}, Formula: "p n", Valid: "0 ≤ p ≤ 1", Source: "mean of a binomial count",
			Example: "failures(1e-10, 2e9)",
		}, euv.Failures),
		Bind2(Row{
			Name: "no_failure", Section: section, Summary: "probability that none of many features fails",
			Args: []string{"probability: of one feature, small against 1", "features: how many there are"}, Formula: "exp(−p n)", Valid: "p small against 1", Source: "Poisson limit of (1 − p)ⁿ",
			Example: "no_failure(1e-10, 2e9)",
		}, euv.NoFailure),
		Bind2(Row{
			Name: "yield_of", Section: section, Summary: "part of the dies without a killing defect",
			Args: []string{"defect_density: of killing defects", "area: of a die"}, Formula: "exp(−D A)", Valid: "defects strewn without order", Source: "Poisson probability of no event",
			Example: "yield_of(0.1 /cm^2, 80 mm^2)",
		}, euv.YieldOf),
		Bind4(Row{
			Name: "rate_limit_low", Section: section, Summary: "lower confidence limit of the events per trial; 0 where none was seen",
			Args: rate, Formula: "½ χ² at (1 − confidence)/sides, 2 events degrees of freedom, / trials", Valid: "rare events; events ≤ trials", Source: gehrels,
			Example: "rate_limit_low(3, 20000, 95 %, 2)",
		}, euv.RateLimitLow),
		Bind4(Row{
			Name: "rate_limit_high", Section: section, Summary: "upper confidence limit of the events per trial, also where none was seen",
			Args: rate, Formula: "½ χ² at 1 − (1 − confidence)/sides, 2 events + 2 degrees of freedom, / trials", Valid: "rare events; events ≤ trials", Source: gehrels,
			Example: "rate_limit_high(0, 20000, 95 %, 1)",
		}, euv.RateLimitHigh),
	}
}
