using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;
using TrimFit.Core.Turns;

namespace TrimFit.Core.Comparing;

public sealed partial record FlightComparison
{
    /// <summary>Thrusts at which two settings' turns are compared for the sensitivity, fractions of full.</summary>
    private static readonly double[] _pairThrusts = [0, 0.5, 1];

    /// <summary>Brakes that answer otherwise warn at 5 %, but keep a pair from being used only when it is this sure.</summary>
    private const double SureP = 0.01;

    /// <summary>Compares flights.</summary>
    /// <remarks>Never throws on thin data: a flight that could not tell its pull over power is named and left out.</remarks>
    /// <param name="flights">At least one, in the order flown. The first one's setting is "before", the setting that appears last for the first time
    /// is "after".</param>
    /// <param name="options">Balance thrust, tolerance, what was changed, scatter.</param>
    /// <exception cref="ArgumentException">There is no flight.</exception>
    public static FlightComparison Run(ImmutableArray<ComparedFlight> flights, ComparisonOptions options)
    {
        ArgumentNullException.ThrowIfNull(options);
        if (flights.IsDefaultOrEmpty)
            throw new ArgumentException("needs at least one flight", nameof(flights));
        var notices = new List<CompareNotice>();
        bool newtons = flights.All(f => f.Analysis.Signals.ThrustBasis == ThrustBasis.Newton);
        if (!newtons && flights.Any(f => f.Analysis.Signals.ThrustBasis == ThrustBasis.Newton))
            notices.Add(CompareNotice.Of(CompareNoticeCode.ThrustBasesDiffer));
        double full = newtons ? flights[^1].Analysis.Signals.FullThrust : 1;

        var estimates = new List<FlightEstimate>();
        var used = new List<int>();
        for (int i = 0; i < flights.Length; i++)
        {
            if (FlightEstimate.Of(flights[i], newtons ? full : null, options.Trim.BalanceThrust) is FlightEstimate estimate)
            {
                estimates.Add(estimate);
                used.Add(i);
            }
            else
            {
                notices.Add(CompareNotice.About(CompareNoticeCode.FlightNotUsed, [flights[i].Name]));
            }
        }
        var result = new FlightComparison
        {
            Options = options,
            Flights = flights,
            ThrustBasis = newtons ? ThrustBasis.Newton : ThrustBasis.Relative,
            CommonFullThrust = full,
            Setups = [],
        };
        notices.AddRange(UndeclaredDifferences.OfRigs([.. flights.Select(f => f.Analysis.Rig)], options.Changed));
        notices.AddRange(UndeclaredDifferences.OfFlights([.. flights.Select(f => new FlightCircumstances(f))], options.Changed));
        if (options.Changed == ChangedPart.Wing)
            notices.Add(CompareNotice.Of(CompareNoticeCode.SwapLimits));
        if (used.Count == 0)
            return result with { Notices = [.. notices] };
        return new Builder(result, [.. estimates], [.. used], notices).Build();
    }

    /// <summary>The steps of one comparison, over what they share.</summary>
    private sealed class Builder
    {
        private readonly FlightComparison _empty;
        private readonly FlightEstimate[] _estimates;
        private readonly int[] _used;
        private readonly List<CompareNotice> _notices;
        private readonly ComparisonOptions _options;
        private readonly string[] _names;
        private readonly int[][] _ofSetup; // places among the estimates
        private readonly PooledFlights _pooled;
        private readonly (PowerSetting Setting, double X)[] _settings;
        private readonly double _balance, _cruiseError, _balanceError;

        public Builder(FlightComparison empty, FlightEstimate[] estimates, int[] used, List<CompareNotice> notices)
        {
            (_empty, _estimates, _used, _notices, _options) = (empty, estimates, used, notices, empty.Options);
            _names = [.. used.Select(i => empty.Flights[i].Setup).Distinct()];
            _ofSetup = [.. _names.Select(n => Enumerable.Range(0, used.Length).Where(k => empty.Flights[used[k]].Setup == n).ToArray())];
            _pooled = new PooledFlights(estimates, _ofSetup, _options.Scatter);
            double Mean(Func<FlightEstimate, double> of) => estimates.Average(of);
            double MeanError(Func<FlightEstimate, double> of) => Math.Sqrt(estimates.Sum(e => of(e) * of(e))) / estimates.Length;
            // Every setting is asked at the same thrust, so that a change of level-flight thrust does not look like a change of the pull.
            _settings =
            [
                (PowerSetting.Off, 0), (PowerSetting.Idle, Mean(e => e.Common(e.Levels.Idle))),
                (PowerSetting.Cruise, Mean(e => e.Common(e.Levels.Cruise))), (PowerSetting.Full, 1),
            ];
            _cruiseError = MeanError(e => e.Common(e.Levels.CruiseStdError));
            _balance = Mean(e => e.Common(e.Levels.Balance));
            _balanceError = MeanError(e => e.Common(e.Levels.BalanceStdError));
        }

        private int Last => _names.Length - 1;
        private double Tolerance => _options.Trim.Tolerance.RadPerSec;

        public FlightComparison Build()
        {
            ImmutableArray<ComparedSetup> setups = [.. _names.Select((_, s) => Setup(s))];
            FlightComparison result = _empty with { Setups = setups, Scatter = _pooled.Report(_options.Scatter) };
            if (setups.Any(s => s.Method == PoolingMethod.AssumedScatter) && !_options.Scatter.IsKnown)
                _notices.Add(CompareNotice.Of(CompareNoticeCode.ScatterAssumed, _options.Scatter.RadPerSec));
            if (_names.Length > 1)
            {
                SettingChange atBalance = Change(setups, PowerSetting.Cruise, _balance, _balanceError, s => s.AtBalance);
                ImmutableArray<SettingChange> changes = [.. _settings.Select((s, i) => Change(setups, s.Setting, s.X, ErrorOf(s.Setting), x => x.At[i]))];
                result = result with
                {
                    Changes = changes,
                    AtBalance = atBalance,
                    Coefficients = [.. CoefficientChanges()],
                    Removed = ShareGone(atBalance.Before.Rate, atBalance.Change),
                    Verdict = Judge(changes, atBalance),
                    Attribution = Attribute(atBalance),
                    SwapBacks = [.. SwapBacksOf()],
                    Trend = TrendOf(setups),
                };
                if (_ofSetup[0].Length == 1)
                    _notices.Add(CompareNotice.Of(CompareNoticeCode.RegressionToTheMean));
                if (result.Coefficients.FirstOrDefault(c => c.Name == TurnCoefficient.BrakeDifference) is CoefficientChange brake
                    && UndeclaredDifferences.OfBrakes(brake.Before, brake.After, _options.Changed) is CompareNotice tightened)
                    _notices.Add(tightened);
            }
            ComparedFlight last = _empty.Flights[_used[_ofSetup[Last][^1]]];
            TrimOptions options = _options.Trim with { KnownChanges = KnownChanges(last) };
            TurnFit fit = Together(Last, withScatter: true);
            return result with
            {
                NextFit = fit,
                NextOptions = options,
                Next = _options.WithNext ? TrimAnalysis.Run(last.Analysis.Signals, fit, last.Analysis.Rig, options, last.Analysis.CrossCheck) : null,
                PairUsed = !options.KnownChanges.IsEmpty,
                Notices = [.. _notices],
            };
        }

        private double ErrorOf(PowerSetting setting) => setting == PowerSetting.Cruise ? _cruiseError : 0;

        private PooledFlights.Quantity PullOf(int setup, double x, double error) => _pooled.Of(setup, [1, x, x * x], ThrustVariance(setup, x, error));

        private double ThrustVariance(int setup, double x, double error)
        {
            (double[] c, _) = _pooled.Normal(setup, withScatter: false);
            double growth = (c[1] + (2 * c[2] * x)) * error;
            return growth * growth;
        }

        private ComparedSetup Setup(int s)
        {
            SetupPull At(PowerSetting setting, double x, double error) => new(setting, x,
                _empty.ThrustBasis == ThrustBasis.Newton ? x * _empty.CommonFullThrust : null, _pooled.Distribution(PullOf(s, x, error)));
            return new()
            {
                Name = _names[s],
                Flights = [.. _ofSetup[s].Select(k => _used[k])],
                Method = _pooled.MethodOf(s),
                At = [.. _settings.Select(p => At(p.Setting, p.X, ErrorOf(p.Setting)))],
                AtBalance = At(PowerSetting.Cruise, _balance, _balanceError),
                CgOffsetM = new RigSpread(RigOf(s)).Nominal.CgOffsetM,
            };
        }

        private Rig RigOf(int setup) => _empty.Flights[_used[_ofSetup[setup][^1]]].Analysis.Rig;

        private SettingChange Change(ImmutableArray<ComparedSetup> setups, PowerSetting setting, double x, double error, Func<ComparedSetup, SetupPull> of)
        {
            PooledFlights.Quantity before = PullOf(0, x, error), after = PullOf(Last, x, error);
            return new(setting, of(setups[0]), of(setups[^1]), _pooled.Difference(after, before), _pooled.SizeDifference(after, before, 0.95));
        }

        private IEnumerable<CoefficientChange> CoefficientChanges()
        {
            string[] names = [TurnCoefficient.Constant, TurnCoefficient.Thrust, TurnCoefficient.ThrustSquared];
            for (int i = 0; i < 3; i++)
            {
                double[] row = new double[3];
                row[i] = 1 / Math.Pow(_empty.CommonFullThrust, i);
                yield return Of(names[i], _pooled.Of(0, row), _pooled.Of(Last, row));
            }
            if (_pooled.BrakeOf(0) is PooledFlights.Quantity before && _pooled.BrakeOf(Last) is PooledFlights.Quantity after)
                yield return Of(TurnCoefficient.BrakeDifference, before, after);

            CoefficientChange Of(string name, PooledFlights.Quantity b, PooledFlights.Quantity a) =>
                new(name, _pooled.Distribution(b), _pooled.Distribution(a), _pooled.Difference(a, b));
        }

        /// <summary>(before − after)/before; null when before does not differ from zero.</summary>
        private static FiellerSet? ShareGone(PullDistribution before, PullDistribution change)
        {
            if (!before.Interval(0.95).ExcludesZero)
                return null;
            double error = before.StandardError;
            return Fieller.Ratio(new(-change.Mean, change.StandardError), new(before.Mean, error), error * error, double.PositiveInfinity, 0.95);
        }

        private ComparisonVerdict Judge(ImmutableArray<SettingChange> changes, SettingChange atBalance)
        {
            // Two one-sided tests at 5 % are the 90 % interval inside the margins (Schuirmann 1987); all three powers must pass.
            bool Inside(Func<SettingChange, PullDistribution> of) => changes.Where(c => c.Setting != PowerSetting.Off)
                .All(c => of(c).Interval(0.90) is var i && i.Lower >= -Tolerance && i.Upper <= Tolerance);
            string[] blind = [.. _ofSetup[Last].Select(k => _empty.Flights[_used[k]])
                .Where(f => !f.Analysis.Signals.HasBrakes && !f.Analysis.Signals.HandsOffDeclared).Select(f => f.Name)];
            bool inside = Inside(c => c.After.Rate), equal = Inside(c => c.Change);
            if (blind.Length > 0)
                _notices.Add(CompareNotice.About(CompareNoticeCode.NoSteering, [.. blind]));
            if (inside && Inside(c => c.Before.Rate))
                _notices.Add(CompareNotice.Of(CompareNoticeCode.BeforeAlreadyInside));
            ConfidenceInterval size = atBalance.SizeChange95;
            ComparisonVerdictCode code = inside && blind.Length == 0 ? ComparisonVerdictCode.Fixed
                : size.Upper < 0 ? ComparisonVerdictCode.Better
                : size.Lower > 0 ? ComparisonVerdictCode.Worse
                : ComparisonVerdictCode.NoClearChange;
            return new(code, equal, inside && blind.Length > 0);
        }

        private ChangeAttribution? Attribute(SettingChange atBalance)
        {
            if (_options.Changed is not ChangedPart part)
                return null;
            AttributedPull of = part switch
            {
                ChangedPart.Propeller => AttributedPull.Power,
                ChangedPart.Geometry or ChangedPart.Ballast => AttributedPull.AtBalance,
                _ => AttributedPull.Constant,
            };
            double x = _balance;
            double[] row = of switch { AttributedPull.Constant => [1, 0, 0], AttributedPull.Power => [0, x, x * x], _ => [1, x, x * x] };
            PooledFlights.Quantity before = _pooled.Of(0, row), after = _pooled.Of(Last, row);
            PullDistribution pull = _pooled.Distribution(before), change = of == AttributedPull.AtBalance ? atBalance.Change : _pooled.Difference(after, before);
            return new(part, of, pull.Mean, change.Mean, change.Interval(0.95), ShareGone(pull, change));
        }

        private IEnumerable<SwapBack> SwapBacksOf()
        {
            double[] row = [1, _balance, _balance * _balance];
            for (int s = 0; s < _ofSetup.Length; s++)
            {
                int[] own = _ofSetup[s];
                for (int i = 1; i < own.Length; i++)
                {
                    if (own[i] == own[i - 1] + 1)
                        continue; // nothing was changed between them
                    FlightEstimate a = _estimates[own[i - 1]], b = _estimates[own[i]];
                    // The scatter by its prior, not by what these flights taught: a setting that moved would teach a large one and hide in it.
                    double variance = PooledFlights.Form(row, a.Covariance) + PooledFlights.Form(row, b.Covariance);
                    ImmutableArray<double> nodes = _options.Scatter.Nodes(32);
                    double change = PooledFlights.Dot(row, b.Coefficients) - PooledFlights.Dot(row, a.Coefficients);
                    var difference = new PullDistribution([.. nodes.Select(sd => new PullDistribution.Part(1.0 / nodes.Length, change,
                        Math.Sqrt(variance + (2 * sd * sd)), double.PositiveInfinity))]);
                    var swap = new SwapBack(_names[s], _used[own[i - 1]], _used[own[i]], change, difference.Interval(0.95));
                    _notices.Add(CompareNotice.About(swap.Agrees ? CompareNoticeCode.SwapBackAgrees : CompareNoticeCode.SwapBackDiffers,
                        [_empty.Flights[swap.First].Name, _empty.Flights[swap.Second].Name], change));
                    yield return swap;
                }
            }
        }

        private static SetupTrend? TrendOf(ImmutableArray<ComparedSetup> setups)
        {
            int places = setups.Select(s => Math.Round(s.CgOffsetM / RigDifference.SamePlaceM)).Distinct().Count();
            if (places < PooledFlights.FewestForRandomEffects)
                return null;
            double[] x = [.. setups.Select(s => s.CgOffsetM)], y = [.. setups.Select(s => s.AtBalance.Rate.Mean)];
            double[] w = [.. setups.Select(s => 1 / (s.AtBalance.Rate.StandardError * s.AtBalance.Rate.StandardError))];
            double sum = w.Sum(), xm = x.Zip(w, (a, b) => a * b).Sum() / sum, ym = y.Zip(w, (a, b) => a * b).Sum() / sum;
            double sxx = 0, sxy = 0;
            for (int i = 0; i < x.Length; i++)
            {
                sxx += w[i] * (x[i] - xm) * (x[i] - xm);
                sxy += w[i] * (x[i] - xm) * (y[i] - ym);
            }
            double slope = sxy / sxx, chi2 = 0;
            for (int i = 0; i < x.Length; i++)
                chi2 += w[i] * Math.Pow(y[i] - ym - (slope * (x[i] - xm)), 2);
            double scale = Math.Max(1, Math.Sqrt(chi2 / (x.Length - 2)));
            double error = scale / Math.Sqrt(sxx), half = StandardNormal.Quantile(0.975) * error;
            // Zero at xm − ym/slope: the mean and the slope of centred data are uncorrelated.
            FiellerSet ratio = Fieller.Ratio(new(-ym, scale / Math.Sqrt(sum)), new(slope, error), 0, double.PositiveInfinity, 0.95);
            FiellerSet zero = ratio with
            {
                Ratio = ratio.Ratio + xm,
                Interval = ratio.Interval is ConfidenceInterval i95 ? new(i95.Lower + xm, i95.Upper + xm, 0.95) : null,
                Gap = ratio.Gap is ConfidenceInterval gap ? new(gap.Lower + xm, gap.Upper + xm, 0.95) : null,
            };
            int best = 0;
            for (int i = 1; i < y.Length; i++)
            {
                if (Math.Abs(y[i]) < Math.Abs(y[best]))
                    best = i;
            }
            return new(slope, new(slope - half, slope + half, 0.95), zero, best, scale);
        }

        /// <summary>The other settings as known changes of the rig, where nothing but the rig's places changed.</summary>
        private ImmutableArray<KnownChange> KnownChanges(ComparedFlight last)
        {
            bool declared = _options.Changed is null or ChangedPart.Geometry or ChangedPart.Harness or ChangedPart.Ballast;
            bool otherwiseAlike = !_notices.Any(n => n.Code is CompareNoticeCode.TrimmersDiffer or CompareNoticeCode.AcceleratorDiffers
                or CompareNoticeCode.AirspeedDiffers || (n.Code == CompareNoticeCode.BrakeResponseChanged && n.Values[2] < SureP));
            var known = ImmutableArray.CreateBuilder<KnownChange>();
            bool refused = false;
            for (int s = 0; s < Last; s++)
            {
                var difference = new RigDifference(last.Analysis.Rig, RigOf(s));
                if (!difference.GeometryDiffers)
                    continue;
                bool clean = declared && otherwiseAlike && !difference.WingDiffers && !difference.PropellerDiffers && !difference.HangHeightDiffers;
                refused |= !clean;
                if (clean && KnownChange.Of(Together(s, withScatter: false), last.Analysis.Signals.FullThrust, difference.Apply, ScatterFor(s),
                    _ofSetup[s].Length, _pairThrusts) is KnownChange change)
                    known.Add(change);
            }
            if (refused)
                _notices.Add(CompareNotice.Of(CompareNoticeCode.PairNotUsed));
            return known.ToImmutable();
        }

        /// <summary>Once flights of one setting have told the scatter, their word counts.</summary>
        private FlightScatter ScatterFor(int setup) => _pooled.MethodOf(setup) == PoolingMethod.RandomEffects
            ? FlightScatter.Known(Units.AngularRate.FromRadPerSec(Math.Sqrt(_ofSetup[setup].Length)
                * Math.Max(0, _pooled.Distribution(_pooled.Of(setup, [1, 0.5, 0.25])).StandardError)))
            : _options.Scatter;

        /// <summary>One fit for all flights of a setting, in the units of the last flight.</summary>
        private TurnFit Together(int setup, bool withScatter)
        {
            int last = _ofSetup[setup][^1];
            TurnFit fit = _empty.Flights[_used[last]].Analysis.Fit;
            if (_ofSetup[setup].Length == 1 && (!withScatter || _options.Scatter is { IsKnown: true, RadPerSec: 0 }))
                return InUnitsOf(fit, setup);
            (double[] c, double[] v) = _pooled.Normal(setup, withScatter);
            double full = _estimates[last].Scale * _empty.Flights[_used[last]].Analysis.Signals.FullThrust, widen = FlightEstimate.Widening(fit);
            double[] unit = [1, 1 / full, 1 / (full * full)];
            int n = fit.Coefficients.Length;
            double[] covariance = [.. fit.Covariance];
            for (int i = 0; i < 3; i++)
            {
                for (int j = 0; j < n; j++)
                {
                    if (j < 3)
                        covariance[(i * n) + j] = fit.Coefficients[i].Estimate is null || fit.Coefficients[j].Estimate is null ? 0 : v[(i * 3) + j] * unit[i] * unit[j] / (widen * widen);
                    else if (_ofSetup[setup].Length > 1)
                        covariance[(i * n) + j] = covariance[(j * n) + i] = 0; // only the last flight's; with several it is no longer theirs
                }
            }
            return InUnitsOf(fit with
            {
                Coefficients = [.. fit.Coefficients.Select((x, i) => i < 3 && x.Estimate is not null
                    ? x with { Estimate = new Estimate(c[i] * unit[i], Math.Sqrt(covariance[(i * n) + i])) } : x)],
                Covariance = [.. covariance],
            }, setup);
        }

        /// <summary>A fit in the thrust unit of the last setting's flight, when full thrusts differ.</summary>
        private TurnFit InUnitsOf(TurnFit fit, int setup)
        {
            double own = _empty.Flights[_used[_ofSetup[setup][^1]]].Analysis.Signals.FullThrust;
            double wanted = _empty.Flights[_used[_ofSetup[Last][^1]]].Analysis.Signals.FullThrust;
            if (_empty.ThrustBasis == ThrustBasis.Newton || own == wanted)
                return fit; // newtons are newtons
            double ratio = own / wanted; // shares of each full thrust are compared
            double[] unit = [1, ratio, ratio * ratio];
            int n = fit.Coefficients.Length;
            double Unit(int i) => i < 3 ? unit[i] : 1;
            return fit with
            {
                Coefficients = [.. fit.Coefficients.Select((c, i) => c.Estimate is Estimate e ? c with { Estimate = new Estimate(e.Value * Unit(i), e.StandardError * Unit(i)) } : c)],
                Covariance = [.. fit.Covariance.Select((v, at) => v * Unit(at / n) * Unit(at % n))],
            };
        }
    }
}
