namespace TrimFit.Simulation;

/// <summary>First-order Markov process sampled exactly at a fixed step; starts in its steady state.</summary>
internal sealed class MarkovProcess
{
    private readonly RandomStream _random;
    private readonly double _keep, _kick;

    public MarkovProcess(RandomStream random, double standardDeviation, double correlationTimeSec, double stepSec)
    {
        _random = random;
        _keep = Math.Exp(-stepSec / correlationTimeSec);
        _kick = standardDeviation * Math.Sqrt(1 - (_keep * _keep));
        Value = standardDeviation * random.Normal();
    }

    public double Value { get; private set; }

    public double Step() => Value = (_keep * Value) + (_kick * _random.Normal());
}
