using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Comparing;

/// <summary>What differs between flights besides what was declared.</summary>
internal static class UndeclaredDifferences
{
    private const double ClearDeviations = 2.576; // 1 % two-sided: a warning on every twentieth pair would not be read
    private const double BrakeDeviations = 1.96, BrakeShare = 0.1; // a tightened line takes up slack, which changes the answer by far more than a tenth

    /// <summary>Differences of the rig files, given what was declared.</summary>
    public static IEnumerable<CompareNotice> OfRigs(IReadOnlyList<Rig> rigs, ChangedPart? changed)
    {
        RigDifference[] all = [.. Pairs(rigs)];
        bool geometry = all.Any(d => d.GeometryDiffers), wing = all.Any(d => d.WingDiffers), propeller = all.Any(d => d.PropellerDiffers);
        double kg = rigs.Max(RigSpread.SuspendedKg) - rigs.Min(RigSpread.SuspendedKg);
        if (rigs.Count < 2)
            yield break;
        if (changed is null && !geometry && !wing && !propeller && kg < FlightCircumstances.MassKg)
            yield return CompareNotice.Of(CompareNoticeCode.NothingChanged);
        bool declaredSame = changed switch
        {
            ChangedPart.Geometry => !geometry,
            ChangedPart.Propeller => !propeller,
            ChangedPart.Ballast => kg < 0.1 && !geometry,
            _ => false, // wing, brake lines, trimmers and straps need not show in a rig file
        };
        if (declaredSame)
            yield return CompareNotice.Of(CompareNoticeCode.DeclaredButSame);
        if (geometry && changed is not (null or ChangedPart.Geometry or ChangedPart.Harness or ChangedPart.Ballast))
            yield return CompareNotice.Of(CompareNoticeCode.GeometryDiffers, all.Max(d => d.LargestMoveM));
        if (wing && changed is not ChangedPart.Wing)
            yield return CompareNotice.About(CompareNoticeCode.WingDiffers, [.. rigs.Select(r => r.Wing.Name).Where(n => n.Length > 0).Distinct()]);
        if (propeller && changed is not ChangedPart.Propeller)
            yield return CompareNotice.Of(CompareNoticeCode.PropellerDiffers);
        if (all.Any(d => d.HangHeightDiffers))
            yield return CompareNotice.Of(CompareNoticeCode.HangHeightDiffers, rigs.Min(r => r.Mass.CgDepthM.Value), rigs.Max(r => r.Mass.CgDepthM.Value));
    }

    /// <summary>Differences of load, air and ways of flying.</summary>
    public static IEnumerable<CompareNotice> OfFlights(IReadOnlyList<FlightCircumstances> flights, ChangedPart? changed)
    {
        if (flights.Count < 2)
            yield break;
        if (changed is not ChangedPart.Ballast && Extremes(flights, f => f.MassKgs) is { } mass && mass.High - mass.Low >= FlightCircumstances.MassKg - 1e-9)
            yield return Notice(CompareNoticeCode.MassDiffers, mass);
        if (Extremes(flights, f => f.Density) is { } density && density.High - density.Low > FlightCircumstances.DensityShare * density.High)
            yield return Notice(CompareNoticeCode.DensityDiffers, density);
        else if (Extremes(flights, f => f.Height) is { } height && height.High - height.Low > FlightCircumstances.HeightM)
            yield return Notice(CompareNoticeCode.HeightDiffers, height);
        if (Extremes(flights, f => f.Wind) is { } wind && wind.High - wind.Low > FlightCircumstances.WindMPerSec)
            yield return Notice(CompareNoticeCode.WindDiffers, wind);
        if (changed is not (ChangedPart.Wing or ChangedPart.Trimmers or ChangedPart.Ballast) && AirspeedNotice(flights) is CompareNotice airspeed)
            yield return airspeed;
        if (PowerNotice(flights) is CompareNotice power)
            yield return power;
        if (changed is not ChangedPart.Trimmers
            && flights.Where(f => f.Sheet is { WingTrim.Length: > 0 }).DistinctBy(f => f.Sheet!.WingTrim, StringComparer.OrdinalIgnoreCase).ToArray() is [var one, var other, ..])
            yield return CompareNotice.About(CompareNoticeCode.TrimmersDiffer, [one.Name, other.Name]);
        if (Extremes(flights, f => f.Sheet?.Accelerator) is { } accelerator && accelerator.High - accelerator.Low > 0.05)
            yield return Notice(CompareNoticeCode.AcceleratorDiffers, accelerator);
        if (Extremes(flights, f => f.SensorTilt) is { } tilt && tilt.High - tilt.Low > FlightCircumstances.SensorAngleRad)
            yield return Notice(CompareNoticeCode.SensorRemounted, tilt);
        if (Extremes(flights, f => f.RightTurns) is { } turns && turns.High - turns.Low > FlightCircumstances.TurnShare)
            yield return Notice(CompareNoticeCode.TurnDirectionsDiffer, turns);
    }

    /// <summary>Whether the brakes answer otherwise with the last setting than with the first; null when they do not, or nothing tells.</summary>
    public static CompareNotice? OfBrakes(PullDistribution before, PullDistribution after, ChangedPart? changed)
    {
        if (changed is ChangedPart.BrakeLines or ChangedPart.Wing)
            return null;
        double a = before.StandardError, b = after.StandardError, change = after.Mean - before.Mean, error = Math.Sqrt((a * a) + (b * b));
        return Math.Abs(change) > BrakeDeviations * error && Math.Abs(change) > BrakeShare * Math.Abs(before.Mean)
            ? CompareNotice.Of(CompareNoticeCode.BrakeResponseChanged, before.Mean, after.Mean, 2 * StandardNormal.Cdf(-Math.Abs(change) / error))
            : null;
    }

    private static CompareNotice? AirspeedNotice(IReadOnlyList<FlightCircumstances> flights)
    {
        // Airspeed at one angle of attack goes with the root of mass over density, both of which have warnings of their own.
        (FlightCircumstances Flight, Estimate Speed)[] speeds = [.. flights.Where(f => f.Airspeed is not null)
            .Select(f => (f, Scaled(f.Airspeed!.Value, Math.Sqrt((f.Density ?? 1.2) / 1.2 / f.MassKgs * 100))))];
        if (speeds.Length < 2)
            return null;
        var slow = speeds.MinBy(s => s.Speed.Value);
        var fast = speeds.MaxBy(s => s.Speed.Value);
        double error = Math.Sqrt((slow.Speed.StandardError * slow.Speed.StandardError) + (fast.Speed.StandardError * fast.Speed.StandardError));
        double gap = fast.Speed.Value - slow.Speed.Value;
        return gap > ClearDeviations * error && gap > FlightCircumstances.AirspeedShare * fast.Speed.Value
            ? CompareNotice.About(CompareNoticeCode.AirspeedDiffers, [slow.Flight.Name, fast.Flight.Name], slow.Flight.Airspeed!.Value.Value, fast.Flight.Airspeed!.Value.Value)
            : null;

        static Estimate Scaled(Estimate e, double factor) => new(e.Value * factor, e.StandardError * factor);
    }

    private static CompareNotice? PowerNotice(IReadOnlyList<FlightCircumstances> flights)
    {
        FlightCircumstances[] flown = [.. flights.Where(f => f.Flown is not null)];
        double worst = 1;
        ImmutableArray<string> names = [];
        for (int i = 0; i < flown.Length; i++)
        {
            for (int j = i + 1; j < flown.Length; j++)
            {
                (double low, double high) = flown[i].Flown!.Value;
                (double otherLow, double otherHigh) = flown[j].Flown!.Value;
                double union = Math.Max(high, otherHigh) - Math.Min(low, otherLow);
                double share = union > 0 ? Math.Max(0, Math.Min(high, otherHigh) - Math.Max(low, otherLow)) / union : 1;
                if (share < worst)
                    (worst, names) = (share, [flown[i].Name, flown[j].Name]);
            }
        }
        return worst < FlightCircumstances.LeastOverlap ? CompareNotice.About(CompareNoticeCode.PowerRangesApart, names, worst) : null;
    }

    private static (double Low, double High, string LowName, string HighName)? Extremes(IReadOnlyList<FlightCircumstances> flights, Func<FlightCircumstances, double?> of)
    {
        FlightCircumstances[] known = [.. flights.Where(f => of(f) is double v && double.IsFinite(v))];
        if (known.Length < 2)
            return null;
        FlightCircumstances low = known.MinBy(of)!, high = known.MaxBy(of)!;
        return (of(low)!.Value, of(high)!.Value, low.Name, high.Name);
    }

    private static CompareNotice Notice(CompareNoticeCode code, (double Low, double High, string LowName, string HighName) extremes) =>
        CompareNotice.About(code, [extremes.LowName, extremes.HighName], extremes.Low, extremes.High);

    private static IEnumerable<RigDifference> Pairs(IReadOnlyList<Rig> rigs)
    {
        for (int i = 1; i < rigs.Count; i++)
            yield return new(rigs[0], rigs[i]);
    }
}
