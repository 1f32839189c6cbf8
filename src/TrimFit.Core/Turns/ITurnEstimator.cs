namespace TrimFit.Core.Turns;

/// <summary>A method that finds how the turn rate follows thrust and brakes.</summary>
public interface ITurnEstimator
{
    /// <summary>Fits the turn model; never throws on thin data: what the flight cannot give comes back as a null estimate with a reason.</summary>
    TurnFit Estimate(TurnSignals signals);
}
