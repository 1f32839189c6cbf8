using TrimFit.Core.Rigging;

namespace TrimFit.Core.Analysis;

/// <summary>A check that could overturn an answer, cheapest first.</summary>
public enum NextCheck
{
    /// <summary>Stand behind the machine: rotation, then signs of gyro and steering.</summary>
    Rotation,
    /// <summary>Look which brake column is which.</summary>
    BrakeColumns,
    /// <summary>Mark hands-off legs on a flight sheet.</summary>
    HandsOffLegs,
    /// <summary>Two hanging scales: where the weight sits.</summary>
    HangCheck,
    /// <summary>Measure where the thrust line passes beside the carabiners' middle.</summary>
    ThrustLine,
    /// <summary>Measure how deep the thrust line and the CG hang below the carabiners.</summary>
    Depths,
    /// <summary>Measure the hang-back of the thrust axis.</summary>
    HangBack,
    /// <summary>Measure the propeller's torque: power and speed.</summary>
    Torque,
    /// <summary>More legs at idle, level flight and full power.</summary>
    MoreLegs,
    /// <summary>A ballast leg each way, or a second flight after the first step.</summary>
    KnownShift,
}

/// <summary>Finds the one cheapest check that could overturn an answer.</summary>
internal static class CheapestCheck
{
    /// <summary>A quantity that explains this share of the answer's variance could overturn it.</summary>
    private const double NotableShare = 0.15;

    /// <summary>The check, and the share of the answer's variance it would take away (1 where the answer waits for it); null when balanced.</summary>
    public static Finding? Of(VerdictRules.Outcome outcome, Rig rig, TrimPosterior posterior, PowerLevels levels, TravelEffect? effect)
    {
        if (outcome.Code == VerdictCode.Balanced)
            return null;
        foreach (Finding reason in outcome.Reasons)
        {
            NextCheck? waiting = reason.Code switch
            {
                FindingCode.RotationConflict => NextCheck.Rotation,
                FindingCode.BrakeSignReversed => NextCheck.BrakeColumns,
                FindingCode.NoSteeringNoHandsOff => NextCheck.HandsOffLegs,
                FindingCode.SensitivityConflict => NextCheck.ThrustLine,
                FindingCode.SourcesConflict => NextCheck.KnownShift,
                FindingCode.ThrustRangeTooSmall or FindingCode.BalanceThrustNotFlown or FindingCode.PullTooUncertain or FindingCode.TooLittleSteadyFlight
                    => NextCheck.MoreLegs,
                _ => null,
            };
            if (waiting is NextCheck check)
                return Finding.Of(FindingCode.NextCheck, (int)check, 1);
        }
        if (outcome.Code == VerdictCode.Insufficient)
            return null; // the log lacks a channel, and the reason says which

        int count = posterior.Count;
        var answer = new double[count];
        for (int k = 0; k < count; k++)
        {
            if (!(posterior.Weight[k] > 0))
                continue;
            double balance = posterior.BalanceOf(k, levels), rate = posterior.RateAt(k, balance);
            answer[k] = effect is null ? -rate / posterior.Sensitivity[k] : effect.Null(k, balance, rate).Travel;
        }
        double Share(Func<int, double> quantity) => SquaredCorrelation(answer, quantity, posterior.Weight);
        var shares = new List<(NextCheck Check, double Share)>();
        if (rig.HangCheck is null)
            shares.Add((NextCheck.HangCheck, Share(k => posterior.Rigs[k].CgOffsetM)));
        shares.Add((NextCheck.ThrustLine, Share(k => posterior.Rigs[k].ThrustLineOffsetM)));
        shares.Add((NextCheck.Depths, Share(k => posterior.Rigs[k].ThrustAboveCgM)));
        shares.Add((NextCheck.HangBack, Share(k => posterior.Rigs[k].HangBackRad)));
        shares.Add((NextCheck.Torque, Share(k => posterior.Rigs[k].TorqueArmM * posterior.Rigs[k].FullThrustN)));
        shares.Add((NextCheck.MoreLegs, Share(k => posterior.RateAt(k, levels.Balance))));
        shares.Add((NextCheck.KnownShift, Share(k => Math.Log(posterior.Sensitivity[k]))));
        (NextCheck cheapest, double share) = shares.Find(s => s.Share >= NotableShare);
        if (share < NotableShare)
            (cheapest, share) = shares.MaxBy(s => s.Share);
        return Finding.Of(FindingCode.NextCheck, (int)cheapest, share);
    }

    /// <summary>Share of the weighted variance of <paramref name="answer"/> that a straight line in a quantity explains; 0 when one does not vary.</summary>
    private static double SquaredCorrelation(double[] answer, Func<int, double> quantity, double[] weight)
    {
        double total = 0, meanX = 0, meanY = 0;
        for (int k = 0; k < answer.Length; k++)
        {
            if (!(weight[k] > 0))
                continue;
            total += weight[k];
            meanX += weight[k] * (quantity(k) - meanX) / total;
            meanY += weight[k] * (answer[k] - meanY) / total;
        }
        double xx = 0, xy = 0, yy = 0;
        for (int k = 0; k < answer.Length; k++)
        {
            if (!(weight[k] > 0))
                continue;
            double x = quantity(k) - meanX, y = answer[k] - meanY;
            xx += weight[k] * x * x;
            xy += weight[k] * x * y;
            yy += weight[k] * y * y;
        }
        return xx > 0 && yy > 0 ? xy * xy / (xx * yy) : 0;
    }
}
