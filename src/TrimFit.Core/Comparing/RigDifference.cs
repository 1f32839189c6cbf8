using TrimFit.Core.Rigging;

namespace TrimFit.Core.Comparing;

/// <summary>What differs between two rig files.</summary>
internal sealed class RigDifference
{
    /// <summary>Places are set and read to about half a millimetre.</summary>
    public const double SamePlaceM = 0.0005;

    private const double SameHeightM = 0.02, SameShare = 0.02, SameAngleRad = 0.002;

    private readonly RigValues _delta;

    public RigDifference(Rig from, Rig to)
    {
        RigValues a = new RigSpread(from).Nominal, b = new RigSpread(to).Nominal;
        bool checkedHang = from.HangCheck is not null && to.HangCheck is not null;
        _delta = new()
        {
            LeftM = b.LeftM - a.LeftM,
            RightM = b.RightM - a.RightM,
            FrontOffsetM = b.FrontOffsetM - a.FrontOffsetM,
            RearOffsetM = b.RearOffsetM - a.RearOffsetM,
            ThrustLineM = b.ThrustLineM - a.ThrustLineM,
            CantRad = b.CantRad - a.CantRad,
            PowerUnitLateralM = b.PowerUnitLateralM - a.PowerUnitLateralM,
            PostureM = checkedHang ? b.PostureM - a.PostureM : 0, // two hang checks measured the CG's move; one alone compares with a tape
            PilotKg = b.PilotKg - a.PilotKg,
            PowerUnitKg = b.PowerUnitKg - a.PowerUnitKg,
        };
        LargestMoveM = new[] { _delta.LeftM, _delta.RightM, _delta.FrontOffsetM, _delta.RearOffsetM, _delta.ThrustLineM, _delta.PowerUnitLateralM }.Max(Math.Abs);
        GeometryDiffers = LargestMoveM > SamePlaceM || Math.Abs(_delta.CantRad) > SameAngleRad;
        HangHeightDiffers = Math.Abs(b.CgDepthM - a.CgDepthM) > SameHeightM;
        WingDiffers = from.Wing.Name != to.Wing.Name && from.Wing.Name.Length > 0 && to.Wing.Name.Length > 0 || Apart(from.Wing.AreaM2, to.Wing.AreaM2);
        RigPropeller p = from.Propeller, q = to.Propeller;
        PropellerDiffers = p.Rotation != q.Rotation || Apart(p.DiameterM, q.DiameterM) || Apart(p.ShaftPowerW, q.ShaftPowerW)
            || Apart(p.StaticThrustN?.Value, q.StaticThrustN?.Value) || Apart(p.FullPowerRevPerSec, q.FullPowerRevPerSec);
    }

    /// <summary>Largest move of a lateral place, m.</summary>
    public double LargestMoveM { get; }
    public bool GeometryDiffers { get; }
    public bool HangHeightDiffers { get; }
    public bool WingDiffers { get; }
    public bool PropellerDiffers { get; }

    /// <summary>A draw of the first rig as the second one: each place moved by what the files differ, the draw's own errors kept.</summary>
    public RigValues Apply(RigValues rig) => rig with
    {
        LeftM = rig.LeftM + _delta.LeftM,
        RightM = rig.RightM + _delta.RightM,
        FrontOffsetM = rig.FrontOffsetM + _delta.FrontOffsetM,
        RearOffsetM = rig.RearOffsetM + _delta.RearOffsetM,
        ThrustLineM = rig.ThrustLineM + _delta.ThrustLineM,
        CantRad = rig.CantRad + _delta.CantRad,
        PowerUnitLateralM = rig.PowerUnitLateralM + _delta.PowerUnitLateralM,
        PostureM = rig.PostureM + _delta.PostureM,
        PilotKg = Math.Max(1, rig.PilotKg + _delta.PilotKg),
        PowerUnitKg = Math.Max(1, rig.PowerUnitKg + _delta.PowerUnitKg),
    };

    private static bool Apart(double? a, double? b) => a is double x && b is double y && Math.Abs(x - y) > SameShare * Math.Max(Math.Abs(x), Math.Abs(y));
}
