using TrimFit.Core.Rigging;

namespace TrimFit.Core.Analysis;

/// <summary>Hang-back and riser load of each draw at the few thrusts an analysis asks for, solved once: a part moved sideways leaves them as they are.</summary>
internal sealed class KnownLeans(RigValues[] rigs, double[] yawRatio)
{
    /// <summary>Off, idle, level and full; the balance thrust of a draw; one to spare.</summary>
    private const int Places = 6;

    private readonly Entry[] _entries = new Entry[rigs.Length * Places];

    /// <summary>The draw's statics at a fraction of full thrust.</summary>
    public ref readonly Entry At(int draw, double fraction)
    {
        Span<Entry> places = _entries.AsSpan(draw * Places, Places);
        int free = Places - 1; // when all are taken the last is given up
        for (int i = 0; i < Places; i++)
        {
            if (places[i].Solved && places[i].Fraction == fraction) // the same double comes again
                return ref places[i];
            if (!places[i].Solved)
            {
                free = i;
                break;
            }
        }
        double thrust = fraction * rigs[draw].FullThrustN;
        RiserLean lean = RigStatics.Lean(rigs[draw], thrust);
        places[free] = new Entry(true, fraction, lean, RigStatics.TurningOffset(rigs[draw], thrust, yawRatio[draw], lean));
        return ref places[free];
    }

    /// <summary>One draw at one thrust.</summary>
    /// <param name="Solved">Whether the place is taken.</param>
    /// <param name="Fraction">Thrust as a fraction of full.</param>
    /// <param name="Lean">Hang-back and riser load.</param>
    /// <param name="TurningOffsetM">(M + rho_y N)/W of the rig as drawn, m.</param>
    public readonly record struct Entry(bool Solved, double Fraction, RiserLean Lean, double TurningOffsetM);
}
