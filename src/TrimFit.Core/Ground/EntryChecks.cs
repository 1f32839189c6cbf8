using System.Collections.Immutable;
using TrimFit.Core.Rigging;
using TrimFit.Core.Statistics;

namespace TrimFit.Core.Ground;

/// <summary>Finds what was written down wrong, before it turns an adjustment round.</summary>
public static class EntryChecks
{
    /// <summary>Weight that may be missing from the two scales or from those under the power unit: scales, clothing and fuel, kg and fraction (common practice, no source).</summary>
    private const double WeightSlackKg = 2, WeightSlackShare = 0.03;

    /// <summary>Places and distance of the riser carabiners agree within this, m: two rules held against tubes.</summary>
    private const double SpacingSlackM = 0.010;

    /// <summary>Lateral readings closer to the centre line than this are not judged for a slip by ten, mm.</summary>
    private const double SmallestLateralMm = 15;

    /// <summary>Counted and entered reduction agree within this.</summary>
    private const double ReductionSlack = 0.04;

    /// <summary>A leaning pilot must move at least this share of the weight for the lean to say anything.</summary>
    private const double LeanShare = 0.005;

    private static readonly double _conflict = StandardNormal.Quantile(0.995); // 1 % of right checks are doubted

    /// <summary>Faults of a rig's ground readings.</summary>
    /// <param name="rig">The rig with the readings in it.</param>
    /// <param name="earlier">The rig before the readings; null when there was none.</param>
    /// <param name="repeats">Raw repeats by key of the rig file, unit of the file.</param>
    public static ImmutableArray<GroundFault> Of(Rig rig, Rig? earlier, IReadOnlyDictionary<string, ImmutableArray<double>> repeats)
    {
        ArgumentNullException.ThrowIfNull(rig);
        ArgumentNullException.ThrowIfNull(repeats);
        var faults = ImmutableArray.CreateBuilder<GroundFault>();
        faults.AddRange(OfRepeats(repeats));
        bool slipped = faults.Count > 0; // a mean with a slip in it contradicts everything else
        if (earlier is not null)
            AddSidesSwapped(faults, rig, earlier);
        AddDrive(faults, rig);
        if (!slipped)
        {
            AddPowerUnit(faults, rig, repeats);
            faults.AddRange(OfHangCheck(rig));
        }
        return faults.ToImmutable();
    }

    /// <summary>Repeats of which one is off by ten against the others.</summary>
    /// <param name="repeats">Raw repeats by key of the rig file, unit of the file.</param>
    public static ImmutableArray<GroundFault> OfRepeats(IReadOnlyDictionary<string, ImmutableArray<double>> repeats)
    {
        ArgumentNullException.ThrowIfNull(repeats);
        var faults = ImmutableArray.CreateBuilder<GroundFault>();
        foreach ((string key, ImmutableArray<double> values) in repeats.OrderBy(r => r.Key, StringComparer.Ordinal))
        {
            double smallest = key.EndsWith("_mm", StringComparison.Ordinal) ? SmallestLateralMm : key.EndsWith("_c", StringComparison.Ordinal) || key.EndsWith("_deg", StringComparison.Ordinal) ? double.PositiveInfinity : 0;
            if (FactorTen.Find(values.AsSpan(), smallest) is (int index, double corrected))
                faults.Add(new(GroundFaultCode.FactorTenInRepeats, key, index + 1, values[index], corrected));
        }
        return faults.ToImmutable();
    }

    /// <summary>What the rig's hang check contradicts; nothing without a hang check.</summary>
    public static ImmutableArray<GroundFault> OfHangCheck(Rig rig)
    {
        ArgumentNullException.ThrowIfNull(rig);
        if (rig.HangCheck is not RigHangCheck check)
            return [];
        var faults = ImmutableArray.CreateBuilder<GroundFault>();
        if (check.CarabinerSpacingM is Reading spacing)
        {
            double places = rig.Carabiners.RightM.Value - rig.Carabiners.LeftM.Value;
            if (Math.Abs(spacing.Value - places) > SpacingSlackM + (1.96 * spacing.StandardDeviation))
                faults.Add(new(GroundFaultCode.SpacingAgainstPlaces, "hang_check.carabiner_spacing_mm", places, spacing.Value));
        }
        double suspended = RigSpread.SuspendedKg(rig), sum = check.AllHangs.Average(h => h.SumKg);
        double slack = WeightSlackKg + (WeightSlackShare * suspended);
        if (Math.Abs(sum - suspended) > slack)
        {
            double left = check.AllHangs.Average(h => h.LeftKg), right = check.AllHangs.Average(h => h.RightKg);
            // One side off by ten: with the other digit the sum fits the mass.
            (string Key, double Reading, double Fixed)[] slips =
            [
                ("hang_check.left_kg", left, suspended - right), ("hang_check.right_kg", right, suspended - left),
            ];
            (string key, double reading, _) = slips.FirstOrDefault(s => FactorTen.Against(s.Reading, s.Fixed) is double c && Math.Abs(sum - s.Reading + c - suspended) <= slack);
            faults.Add(key is null
                ? new(GroundFaultCode.WeightMissing, "hang_check", sum, suspended)
                : new(GroundFaultCode.FactorTen, key, reading, reading > suspended ? reading / 10 : reading * 10));
            return faults.ToImmutable(); // the offset of readings that do not add up says nothing
        }
        if (check.LeanRight is HangReading lean)
        {
            double change = (lean.RightKg / lean.SumKg) - check.AllHangs.Average(h => h.RightKg / h.SumKg);
            if (change < -LeanShare)
            {
                faults.Add(new(GroundFaultCode.ScalesSwappedByLean, "hang_check", change));
                return faults.ToImmutable();
            }
        }
        HangCheckResult hang = RigHang.Of(rig)!;
        LateralGeometry tape = LateralGeometry.Of(rig);
        double spread = Math.Sqrt((hang.StandardError * hang.StandardError) + (tape.StandardDeviation * tape.StandardDeviation));
        double largest = _conflict * spread;
        if (Math.Abs(hang.OffsetM - tape.OffsetM) > largest)
        {
            bool mirrored = Math.Abs(hang.OffsetM + tape.OffsetM) < 1.96 * spread;
            faults.Add(mirrored
                ? new(GroundFaultCode.ScalesSwappedByGeometry, "hang_check", hang.OffsetM, tape.OffsetM)
                : new(GroundFaultCode.HangAgainstGeometry, "hang_check", hang.OffsetM, tape.OffsetM, largest));
        }
        return faults.ToImmutable();
    }

    /// <summary>Both places are the other side's earlier ones, and that is nearer than no change at all.</summary>
    private static void AddSidesSwapped(ImmutableArray<GroundFault>.Builder faults, Rig rig, Rig earlier)
    {
        double left = rig.Carabiners.LeftM.Value, right = rig.Carabiners.RightM.Value;
        double oldLeft = earlier.Carabiners.LeftM.Value, oldRight = earlier.Carabiners.RightM.Value;
        double exchanged = Math.Max(Math.Abs(left + oldRight), Math.Abs(right + oldLeft)), same = Math.Max(Math.Abs(left - oldLeft), Math.Abs(right - oldRight));
        if (same > SpacingSlackM && exchanged <= 0.004)
            faults.Add(new(GroundFaultCode.SidesSwapped, "carabiners", left, right));
    }

    private static void AddDrive(ImmutableArray<GroundFault>.Builder faults, Rig rig)
    {
        RigPropeller propeller = rig.Propeller;
        if (propeller.CrankRotation is PropellerRotation crank && DriveCheck.Propeller(crank, propeller.Drive, propeller.GearReverses) is PropellerRotation must
            && propeller.Rotation != PropellerRotation.ContraRotating && must != propeller.Rotation)
        {
            faults.Add(new(GroundFaultCode.RotationAgainstDrive, "propeller.rotation", crank == PropellerRotation.Clockwise ? 1 : -1, (int)propeller.Drive,
                propeller.Drive == PropellerDrive.Gear && propeller.GearReverses ? 1 : 0));
        }
        if (propeller.CountedReduction is double counted && propeller.GivenReduction is double given && Math.Abs(counted - given) > ReductionSlack * given)
            faults.Add(new(GroundFaultCode.ReductionAgainstCount, "propeller.reduction_ratio", counted, given));
    }

    private static void AddPowerUnit(ImmutableArray<GroundFault>.Builder faults, Rig rig, IReadOnlyDictionary<string, ImmutableArray<double>> repeats)
    {
        const string Left = "weighing.power_unit_left_kg", Right = "weighing.power_unit_right_kg";
        if (!repeats.TryGetValue(Left, out ImmutableArray<double> l) || !repeats.TryGetValue(Right, out ImmutableArray<double> r))
            return;
        double left = l.Average(), right = r.Average(), sum = left + right;
        double dry = rig.Mass.PowerUnitKg.Value + rig.Mass.WheelsKg.Value, full = dry + rig.Mass.FuelKg.Value; // weighed with or without fuel
        double slack = WeightSlackKg + (WeightSlackShare * full);
        if (sum >= dry - slack && sum <= full + slack)
            return;
        (string Key, double Reading, double Other)[] sides = [(Left, left, right), (Right, right, left)];
        foreach ((string key, double reading, double other) in sides)
        {
            if (FactorTen.Against(reading, dry - other) is double corrected)
            {
                faults.Add(new(GroundFaultCode.FactorTen, key, reading, corrected));
                return;
            }
        }
        faults.Add(new(GroundFaultCode.PowerUnitWeight, "weighing", sum, full));
    }
}
