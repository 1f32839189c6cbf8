namespace TrimFit.Core.Turns.FilterError;

/// <summary>Which noise parameters a flight has, as a vector of logarithms with weak normal priors.</summary>
/// <remarks>The priors are wide (a standard deviation of 0.7 to 1.5 in the logarithm is times or over 4 to 20 at 95 %); they keep a
/// parameter the flight says nothing about from running off to 0 or infinity, where the likelihood is flat. Their centres are those of a soft
/// wing under a pilot (model of section "Turn model" in DEVELOPERS.md); none of them was measured on a pilot's own machine.</remarks>
internal sealed class ParameterLayout
{
    private enum Slot { Lag, Frequency, Damping, DisturbanceRms, DisturbanceTau, Quick, Gyro, Heading, GustRms, GustTau, Compass }

    private readonly Slot[] _slots;
    private readonly double[] _centre;
    private readonly double[] _sd;

    private readonly NoiseParameters? _known;

    /// <summary>Only the wing's response is free; the air's and the sensors' noise is known.</summary>
    public static ParameterLayout ResponseOnly(NoiseParameters known) => new(known.Order, false, false, false, known);

    public ParameterLayout(ResponseOrder order, bool hasGyro, bool hasHeading, bool hasCompass)
        : this(order, hasGyro, hasHeading, hasCompass, null)
    {
    }

    private ParameterLayout(ResponseOrder order, bool hasGyro, bool hasHeading, bool hasCompass, NoiseParameters? known)
    {
        Order = order;
        _known = known;
        var slots = new List<Slot>();
        if (order == ResponseOrder.First)
            slots.Add(Slot.Lag);
        else
            slots.AddRange([Slot.Frequency, Slot.Damping]);
        if (known is null)
            slots.AddRange([Slot.DisturbanceRms, Slot.DisturbanceTau, Slot.Quick]);
        if (hasGyro)
            slots.Add(Slot.Gyro);
        if (hasHeading)
            slots.AddRange([Slot.Heading, Slot.GustRms, Slot.GustTau]);
        if (hasCompass)
            slots.Add(Slot.Compass);
        _slots = [.. slots];
        _centre = [.. slots.Select(s => Math.Log(Prior(s).Centre))];
        _sd = [.. slots.Select(s => Prior(s).LogSd)];
    }

    public ResponseOrder Order { get; }

    public int Count => _slots.Length;

    /// <summary>The priors' centres as parameters.</summary>
    public static NoiseParameters Centre { get; } = new()
    {
        Order = ResponseOrder.First,
        LagSec = Prior(Slot.Lag).Centre,
        NaturalFrequency = Prior(Slot.Frequency).Centre,
        Damping = Prior(Slot.Damping).Centre,
        DisturbanceRms = Prior(Slot.DisturbanceRms).Centre,
        DisturbanceTauSec = Prior(Slot.DisturbanceTau).Centre,
        QuickDisturbance = Prior(Slot.Quick).Centre,
        GyroNoise = Prior(Slot.Gyro).Centre,
        HeadingNoise = Prior(Slot.Heading).Centre,
        GustRms = Prior(Slot.GustRms).Centre,
        GustTauSec = Prior(Slot.GustTau).Centre,
        CompassNoise = Prior(Slot.Compass).Centre,
    };

    private static (double Centre, double LogSd) Prior(Slot slot) => slot switch
    {
        Slot.Lag => (1.5, 0.8),
        Slot.Frequency => (1.1, 0.6),
        Slot.Damping => (0.6, 0.5),
        Slot.DisturbanceRms => (double.DegreesToRadians(1.5), 1.2),
        Slot.DisturbanceTau => (8, 0.5),
        Slot.Quick => (double.DegreesToRadians(0.3), 1.2),
        Slot.Gyro => (double.DegreesToRadians(0.5), 1.5),
        Slot.Heading => (double.DegreesToRadians(1.5), 1.2),
        Slot.GustRms => (double.DegreesToRadians(2), 1.0),
        Slot.GustTau => (8, 0.7),
        _ => (double.DegreesToRadians(1.5), 1.2),
    };

    /// <summary>The vector of logarithms of a set of parameters.</summary>
    public double[] ToVector(NoiseParameters p) => [.. _slots.Select(s => Math.Log(s switch
    {
        Slot.Lag => p.LagSec,
        Slot.Frequency => p.NaturalFrequency,
        Slot.Damping => p.Damping,
        Slot.DisturbanceRms => p.DisturbanceRms,
        Slot.DisturbanceTau => p.DisturbanceTauSec,
        Slot.Quick => Math.Max(p.QuickDisturbance, 1e-5),
        Slot.Gyro => p.GyroNoise,
        Slot.Heading => p.HeadingNoise,
        Slot.GustRms => p.GustRms,
        Slot.GustTau => p.GustTauSec,
        _ => p.CompassNoise,
    }))];

    /// <summary>The parameters of a vector of logarithms.</summary>
    public NoiseParameters FromVector(ReadOnlySpan<double> theta)
    {
        double lag = 1.5, frequency = 1.1, damping = 0.6, w = 0.02, tauW = 8, quick = 0, gyro = 0.01, heading = 0.03, gust = 0.03, tauG = 8, compass = 0.03;
        for (int i = 0; i < _slots.Length; i++)
        {
            double value = Math.Exp(theta[i]);
            switch (_slots[i])
            {
                case Slot.Lag: lag = value; break;
                case Slot.Frequency: frequency = value; break;
                case Slot.Damping: damping = value; break;
                case Slot.DisturbanceRms: w = value; break;
                case Slot.DisturbanceTau: tauW = value; break;
                case Slot.Quick: quick = value; break;
                case Slot.Gyro: gyro = value; break;
                case Slot.Heading: heading = value; break;
                case Slot.GustRms: gust = value; break;
                case Slot.GustTau: tauG = value; break;
                default: compass = value; break;
            }
        }
        if (_known is not null)
            return _known with { LagSec = lag, NaturalFrequency = frequency, Damping = damping };
        return new()
        {
            Order = Order,
            LagSec = lag,
            NaturalFrequency = frequency,
            Damping = damping,
            DisturbanceRms = w,
            DisturbanceTauSec = tauW,
            QuickDisturbance = quick,
            GyroNoise = gyro,
            HeadingNoise = heading,
            GustRms = gust,
            GustTauSec = tauG,
            CompassNoise = compass,
        };
    }

    /// <summary>Half the squared distance from the priors' centres, in prior standard deviations.</summary>
    public double PriorPenalty(ReadOnlySpan<double> theta)
    {
        double sum = 0;
        for (int i = 0; i < theta.Length; i++)
        {
            double z = (theta[i] - _centre[i]) / _sd[i];
            sum += z * z / 2;
        }
        return sum;
    }

    /// <summary>Slope of <see cref="PriorPenalty"/> along one parameter.</summary>
    public double PriorSlope(ReadOnlySpan<double> theta, int i) => (theta[i] - _centre[i]) / (_sd[i] * _sd[i]);

    /// <summary>Information the prior brings on one parameter.</summary>
    public double PriorInformation(int i) => 1 / (_sd[i] * _sd[i]);

    /// <summary>Keeps a vector inside six prior standard deviations, where every exponential is a finite, usable number.</summary>
    public void Clamp(Span<double> theta)
    {
        for (int i = 0; i < theta.Length; i++)
            theta[i] = Math.Clamp(theta[i], _centre[i] - (6 * _sd[i]), _centre[i] + (6 * _sd[i]));
    }
}
