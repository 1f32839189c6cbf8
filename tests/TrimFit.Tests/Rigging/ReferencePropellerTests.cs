using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Rigging;

public class ReferencePropellerTests
{
    private const double SeaLevel = 1.225; // kg/m³
    private const double Inch = 0.0254; // m

    [Theory] // UIUC Propeller Database (Brandt, Deters, Ananda, Dantsker & Selig), static runs kt0827 (10x7) and 2150od (16x8); the right-hand columns by arithmetic
    [InlineData(10, 5987, 0.1606, 0.0797, 8.15328, 102.5503, 0.163568, 0.64432, 0.0200616)]
    [InlineData(16, 5460, 0.097155, 0.028955, 26.88431, 296.3141, 0.518240, 0.834477, 0.0192767)]
    public void Measured_coefficients_give_thrust_power_torque_and_merit(double inches, double rpm, double ct, double cp, double thrust, double power, double torque, double merit, double arm)
    {
        PropellerCoefficients propeller = new(ct, cp);
        double diameter = inches * Inch, n = rpm / 60;
        Accuracy.AgreesTo(6, thrust, propeller.ThrustN(SeaLevel, n, diameter));
        Accuracy.AgreesTo(6, power, propeller.PowerW(SeaLevel, n, diameter));
        Accuracy.AgreesTo(5.5, torque, propeller.TorqueNm(SeaLevel, n, diameter));
        Accuracy.AgreesTo(5, merit, propeller.FigureOfMerit);
        Accuracy.AgreesTo(5.5, arm, propeller.TorqueArmM(diameter));
        // The three ways to a torque and to a figure of merit are one.
        Accuracy.AgreesTo(12, propeller.TorqueNm(SeaLevel, n, diameter), ShaftTorque.FromPower(propeller.PowerW(SeaLevel, n, diameter), n));
        double area = MomentumTheory.DiskArea(diameter);
        Accuracy.AgreesTo(12, propeller.FigureOfMerit, MomentumTheory.FigureOfMerit(propeller.ThrustN(SeaLevel, n, diameter), propeller.PowerW(SeaLevel, n, diameter), area, SeaLevel));
        PropellerCoefficients back = PropellerCoefficients.From(propeller.ThrustN(SeaLevel, n, diameter), propeller.PowerW(SeaLevel, n, diameter), SeaLevel, n, diameter);
        Accuracy.AgreesTo(12, ct, back.Thrust);
        Accuracy.AgreesTo(12, cp, back.Power);
    }

    [Theory] // UIUC Propeller Database, 10x7 in forward flight at about 5000 rpm (kt0831): J, C_T, C_P, printed efficiency
    [InlineData(0.114, 0.1470, 0.0757, 0.221)]
    [InlineData(0.173, 0.1419, 0.0760, 0.323)]
    [InlineData(0.290, 0.1245, 0.0734, 0.492)]
    [InlineData(0.397, 0.1037, 0.0672, 0.612)]
    [InlineData(0.482, 0.0872, 0.0616, 0.683)]
    [InlineData(0.578, 0.0692, 0.0546, 0.732)]
    public void Efficiency_is_the_printed_one(double j, double ct, double cp, double efficiency) =>
        Assert.InRange(new PropellerCoefficients(ct, cp).Efficiency(j), efficiency - 0.0015, efficiency + 0.0015); // inputs rounded to 3 and 4 places

    [Fact]
    public void The_torque_arm_moves_five_percent_between_half_and_full_speed()
    {
        // UIUC Propeller Database, 10x7 static run kt0827, 3029 and 5987 rpm: the size of the error of "torque proportional to thrust".
        double half = new PropellerCoefficients(0.1447, 0.0686).TorqueArmM(10 * Inch);
        double full = new PropellerCoefficients(0.1606, 0.0797).TorqueArmM(10 * Inch);
        Assert.Equal(0.01917, half, 5);
        Assert.Equal(0.02006, full, 5);
        Assert.InRange(full / half, 1.046, 1.048);
    }

    [Fact]
    public void The_advance_ratio_is_speed_over_tip_travel() => Accuracy.AgreesTo(15, 0.5, PropellerCoefficients.AdvanceRatio(12.5, 20, 1.25));

    [Fact]
    public void The_tilt_rotor_example_comes_out_as_printed()
    {
        // Leishman, Principles of Helicopter Aerodynamics, chapter 2: 45,000 lb on two rotors of 38 ft, density 0.002378 slug/ft³, figure of merit 0.75, 5 % losses;
        // 64.58 ft/s, 2642 hp ideal and 3523 hp real per rotor, 7397 hp in all. Any consistent units do: slug, ft, lb, s.
        double area = MomentumTheory.DiskArea(38);
        double velocity = MomentumTheory.InducedVelocity(22500, area, 0.002378);
        double ideal = MomentumTheory.IdealPower(22500, area, 0.002378) / 550;
        double real = MomentumTheory.Power(22500, area, 0.002378, 0.75) / 550;
        Assert.InRange(velocity / 64.58, 1 - 3e-4, 1 + 3e-4);
        Assert.InRange(ideal / 2642, 1 - 3e-4, 1 + 3e-4);
        Assert.InRange(real / 3523, 1 - 3e-4, 1 + 3e-4);
        Assert.InRange(2 * real * 1.05 / 7397, 1 - 3e-4, 1 + 3e-4);
    }

    [Fact]
    public void The_climbing_helicopter_needs_its_power_at_110_meters_a_minute()
    {
        // Houghton & Carpenter, Aerodynamics for Engineering Students, exercise: disc loading 170 N/m², diameter 16 m, 53 % of 600 kW = T (V + v): climb 110 m/min.
        double area = MomentumTheory.DiskArea(16);
        double thrust = 170 * area;
        const double climb = 110.72 / 60; // the unrounded answer at 1.225 kg/m³, by hand from V = P/T − v_h² T/P
        double induced = MomentumTheory.InducedVelocity(thrust, area, SeaLevel, climb);
        Accuracy.AgreesTo(4.5, 0.53 * 600_000, thrust * (climb + induced));
        Assert.Equal(110, Math.Floor(climb * 60));
    }

    [Fact]
    public void A_paramotor_needs_eight_and_a_half_kilowatts_for_600_newtons()
    {
        // By arithmetic: √(600/(2·1.225·π/4·1.25²)) = 14.12660 m/s, times 600 N = 8475.960 W.
        double area = MomentumTheory.DiskArea(1.25);
        Accuracy.AgreesTo(6, 14.12660, MomentumTheory.InducedVelocity(600, area, SeaLevel));
        Accuracy.AgreesTo(6, 8475.960, MomentumTheory.IdealPower(600, area, SeaLevel));
        Accuracy.AgreesTo(12, 600, MomentumTheory.Thrust(MomentumTheory.Power(600, area, SeaLevel, 0.6), area, SeaLevel, 0.6));
    }

    [Fact]
    public void Standstill_is_the_limit_of_slow_flight_and_still_air_makes_no_thrust()
    {
        Accuracy.AgreesTo(12, MomentumTheory.InducedVelocity(500, 1.2, 1.2), MomentumTheory.InducedVelocity(500, 1.2, 1.2, 0));
        Assert.Equal(0, MomentumTheory.InducedVelocity(0, 1.2, 1.2, 0));
    }

    [Fact]
    public void Shaft_torque_follows_power_and_speed()
    {
        Accuracy.AgreesTo(8, 76.3943727, ShaftTorque.FromPower(20_000, 2500 / 60.0)); // by arithmetic: 20000·60/(2π·2500)
        // 200 hp at 2700 rpm: lb ft = hp · (33000/2π)/rpm, the textbook 5252. 1 hp = 550 ft lb/s, so in ft, lb, s:
        Accuracy.AgreesTo(5.9, 389.045, ShaftTorque.FromPower(200 * 550, 45));
        Accuracy.AgreesTo(12, 20_000, ShaftTorque.Power(ShaftTorque.FromPower(20_000, 40), 40));
    }

    [Fact]
    public void A_figure_of_merit_above_one_is_refused()
    {
        ArgumentOutOfRangeException error = Assert.Throws<ArgumentOutOfRangeException>(() => MomentumTheory.Power(600, 1, 1.2, 1.1));
        Assert.StartsWith("must be above 0 and at most 1 (Parameter 'figureOfMerit')", error.Message, StringComparison.Ordinal);
    }
}
