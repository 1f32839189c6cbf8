using System.Collections.Immutable;
using TrimFit.Core.Analysis;
using TrimFit.Core.Comparing;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns;
using TrimFit.Tests.Analysis;

namespace TrimFit.Tests.Comparing;

/// <summary>Flights whose fits are given by hand, so that a comparison can be worked out by hand too.</summary>
internal static class MadeUpPair
{
    private static readonly TurnSignals _signals = TurnSignals.From(new MadeUpFlight { PowerDegPerSec = -1 }.Fly(), MadeUpFlight.Rig(), []);

    public static double Deg(double degPerSec) => double.DegreesToRadians(degPerSec);

    /// <summary>A flight with a pull without power and a growth to full power, deg/s, each with its standard error.</summary>
    public static ComparedFlight Flight(string setup, double constant, double error, double slope = 0, double slopeError = 0.01, Rig? rig = null, string name = "flight",
        double brake = 40, double brakeError = 1, double curveError = 1e-4)
    {
        Rig machine = rig ?? MadeUpFlight.Rig();
        TurnFit fit = SensitivitySourcesTests.FitOf(_signals, (constant, error), (slope, slopeError));
        int n = fit.Coefficients.Length;
        double[] covariance = [.. fit.Covariance];
        covariance[(3 * n) + 3] = Deg(brakeError) * Deg(brakeError);
        covariance[(2 * n) + 2] *= Math.Pow(curveError / 0.1, 2);
        fit = fit with
        {
            Coefficients = [.. fit.Coefficients.Select(c => c.Name == TurnCoefficient.BrakeDifference ? c with { Estimate = new(Deg(brake), Deg(brakeError)) } : c)],
            Covariance = [.. covariance],
        };
        return new() { Name = name, Setup = setup, Analysis = TrimAnalysis.Run(_signals, fit, machine, new() { Draws = 200 }) };
    }

    public static Rig Moved(double m, Rig? from = null)
    {
        Rig rig = from ?? MadeUpFlight.Rig();
        return rig with { Carabiners = new() { LeftM = Reading.Measured(rig.Carabiners.LeftM.Value + m, 0.001), RightM = Reading.Measured(rig.Carabiners.RightM.Value + m, 0.001) } };
    }

    public static FlightComparison Compare(ComparisonOptions options, params ReadOnlySpan<ComparedFlight> flights) => FlightComparison.Run([.. flights], options);

    public static ComparisonOptions Known(double scatterDegPerSec, ChangedPart? changed = null) => new()
    {
        Scatter = scatterDegPerSec == 0 ? FlightScatter.None : FlightScatter.Known(Core.Units.AngularRate.FromDegPerSec(scatterDegPerSec)),
        Changed = changed,
        WithNext = false,
    };

    public static ImmutableArray<CompareNoticeCode> Codes(FlightComparison c) => [.. c.Notices.Select(n => n.Code)];
}
