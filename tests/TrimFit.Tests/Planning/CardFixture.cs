using TrimFit.Core.Planning;
using TrimFit.Core.Rigging;
using TrimFit.Core.Turns.FilterError;
using TrimFit.Reporting;

namespace TrimFit.Tests.Planning;

/// <summary>A machine and some cards of it, planned once for all tests.</summary>
internal static class CardFixture
{
    public static Rig Rig { get; } = new()
    {
        Name = "Demo <machine>",
        Mass = new() { PilotKg = Reading.Measured(88), PowerUnitKg = Reading.Measured(30) },
        Propeller = new() { Rotation = PropellerRotation.Clockwise, StaticThrustN = Reading.Measured(600), ShaftPowerW = 14000, DiameterM = 1.25 },
        Carabiners = new() { LeftM = Reading.Measured(-0.215), RightM = Reading.Measured(0.215) },
        BrakeFullTravelM = 0.6,
        Wing = new() { TrimSpeedMPerSec = 11, GlideSinkMPerSec = 2.2 },
    };

    /// <summary>A last flight with a pull of some degrees a second.</summary>
    public static PriorFlight Prior(double disturbanceDegPerSec = 1, double pullDegPerSec = 2) => new()
    {
        Noise = new()
        {
            Order = ResponseOrder.First,
            LagSec = 1.3,
            DisturbanceRms = Rad(disturbanceDegPerSec),
            DisturbanceTauSec = 8,
            QuickDisturbance = Rad(0.2),
            GyroNoise = Rad(0.4),
            HeadingNoise = Rad(1),
            GustRms = Rad(2),
            GustTauSec = 5,
        },
        GyroRowsPerSec = 5,
        HeadingRowsPerSec = 5,
        BrakesLogged = true,
        Constant = Rad(0.4),
        Slope = Rad((pullDegPerSec - 0.4) / 0.4),
        Curvature = 0,
        BrakePerTravel = Rad(45),
        Idle = 0.07,
        Level = 0.4,
        AirspeedMPerSec = 11,
        PullRadPerSec = Rad(pullDegPerSec),
        HeldBrake = -pullDegPerSec / 45,
    };

    private static readonly Lazy<CardPlan> _plan = new(() => CardPlanner.Plan(Rig, new CardOptions { Minutes = 6, Draws = 3 }, Prior()));
    private static readonly Lazy<CardPlan> _phone = new(() => CardPlanner.Plan(Rig, new CardOptions { Minutes = 6, Draws = 3, Logger = CardLogger.Phone }, Prior()));
    private static readonly Lazy<CardPlan> _ballast = new(() => CardPlanner.Plan(Rig, new CardOptions { Minutes = 7, Draws = 3, BallastKg = 5, EngineOffLegs = true }, Prior()));

    public static CardPlan Plan => _plan.Value;
    public static CardPlan Phone => _phone.Value;
    public static CardPlan Ballast => _ballast.Value;

    public static CardReport Report(CardPlan? plan = null) => new()
    {
        Plan = plan ?? Plan,
        Rig = Rig,
        RigFile = new("demo.toml", "00"),
        Provenance = new("1.0.0-test"),
    };

    public static double Rad(double deg) => double.DegreesToRadians(deg);
}
