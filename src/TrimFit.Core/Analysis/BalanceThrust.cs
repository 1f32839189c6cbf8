namespace TrimFit.Core.Analysis;

/// <summary>The thrust at which the turn is to be nulled.</summary>
/// <param name="Kind">A named setting or a number.</param>
/// <param name="Newtons">The number, N, when <paramref name="Kind"/> is <see cref="BalanceThrustKind.Newtons"/>.</param>
public readonly record struct BalanceThrust(BalanceThrustKind Kind, double Newtons = 0)
{
    /// <summary>Thrust of level flight (the default).</summary>
    public static BalanceThrust Cruise => new(BalanceThrustKind.Cruise);

    /// <summary>Full thrust.</summary>
    public static BalanceThrust Full => new(BalanceThrustKind.Full);

    /// <summary>Smallest worst turn over the used range.</summary>
    public static BalanceThrust Even => new(BalanceThrustKind.Even);

    /// <summary>A thrust in newtons.</summary>
    /// <exception cref="ArgumentOutOfRangeException">Not finite or negative.</exception>
    public static BalanceThrust At(double newtons) => new(BalanceThrustKind.Newtons, Guard.NotNegative(newtons));
}

/// <summary>How the balance thrust is chosen.</summary>
public enum BalanceThrustKind
{
    /// <summary>Thrust at zero climb; 60 % of full thrust when no altitude tells.</summary>
    Cruise,
    /// <summary>Full thrust.</summary>
    Full,
    /// <summary>Smallest worst turn over the used range.</summary>
    Even,
    /// <summary>A number.</summary>
    Newtons,
}
