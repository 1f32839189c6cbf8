
namespace TrimFit.Core.Turns;

/// <summary>One window of steady power: means over it.</summary>
internal readonly record struct SteadyWindow(
    int First, int Last, double StartSec, double EndSec, double Thrust, double Brakes, double Trimmers, double TurnRate, double RotationRatioSquared, bool HandsOff, int Segment);

/// <summary>Cuts a flight into windows in which the power is steady and has been for a while.</summary>
internal static class SteadyWindows
{
    /// <summary>Thrust may move by this share of full inside a window; a larger move starts anew.</summary>
    private const double ThrustBand = 0.07;

    /// <summary>Left out after a change of power: the frame swings and the wing finds its new turn (a published wing's mode: 5.8 s), s.</summary>
    private const double SettleSec = 5;

    /// <summary>Window length, s: several turn lags long, so that what the pilot does within it averages out, and short enough for many.</summary>
    private const double WindowSec = 8, ShortestWindowSec = 4;

    /// <summary>A pause between samples longer than this ends a window, s.</summary>
    private const double LongestPauseSec = 2;

    /// <summary>Windows in time order, legs of a shifted CG left out; <see cref="SteadyWindow.Segment"/> changes wherever two windows do not follow each other closely.</summary>
    /// <param name="signals">The flight.</param>
    /// <param name="turnRate">Turn angle source: <c>(first, last) → mean turn rate, NaN when it cannot be told</c>.</param>
    public static List<SteadyWindow> Cut(TurnSignals signals, Func<int, int, double> turnRate)
    {
        double[] time = signals.TimeSec;
        double band = ThrustBand * signals.FullThrust;
        var windows = new List<SteadyWindow>();
        int segment = 0;
        double lastEnd = double.NegativeInfinity;
        int i = 0;
        double settledFrom = double.NegativeInfinity, reference = double.NaN;
        int start = -1;
        bool startHandsOff = false;
        for (; i <= time.Length; i++)
        {
            bool usable = i < time.Length && signals.Use[i] && (signals.CgShiftM.Length == 0 || signals.CgShiftM[i] == 0) && (i == 0 || time[i] - time[i - 1] <= LongestPauseSec);
            bool moved = usable && signals.HasThrust && Math.Abs(signals.Thrust[i] - reference) > band; // false for the first reference, NaN
            bool switched = usable && start >= 0 && signals.HandsOff[i] != startHandsOff;
            bool full = usable && start >= 0 && time[i] - time[start] >= WindowSec;
            if (start >= 0 && (!usable || moved || switched || full))
            {
                Close(start, i - 1);
                start = -1;
            }
            if (!usable)
            {
                reference = double.NaN;
                continue;
            }
            if (double.IsNaN(reference))
            {
                reference = signals.Thrust[i];
                settledFrom = time[i];
            }
            else if (moved)
            {
                reference = signals.Thrust[i];
                settledFrom = time[i] + SettleSec;
            }
            if (start < 0 && time[i] >= settledFrom)
            {
                start = i;
                startHandsOff = signals.HandsOff[i];
                reference = signals.Thrust[i];
            }
        }
        return windows;

        void Close(int first, int last)
        {
            double duration = time[last] - time[first];
            if (duration < ShortestWindowSec)
                return;
            double rate = turnRate(first, last);
            if (!double.IsFinite(rate))
                return;
            if (time[first] - lastEnd > WindowSec)
                segment++;
            lastEnd = time[last];
            windows.Add(new(first, last, time[first], time[last], Mean(signals.Thrust), Mean(signals.BrakeDifference),
                signals.TrimmerDifference.Length > 0 ? Mean(signals.TrimmerDifference) : 0, rate, Mean(signals.RotationRatioSquared), startHandsOff, segment));

            double Mean(double[] column)
            {
                double sum = 0;
                for (int k = first; k <= last; k++)
                    sum += column[k];
                return sum / (last - first + 1);
            }
        }
    }
}
