using TrimFit.Core.Rigging;

namespace TrimFit.Tests.Rigging;

public class ReferenceBifilarTests
{
    [Fact]
    public void Stiffness_torque_and_period_follow_the_closed_forms()
    {
        // By arithmetic from k = m g a b/L and τ = m g a b sin θ/√(L² − a² − b² + 2ab cos θ) (laboratory manual "Bifilar suspension", University of Hyderabad):
        // m 110 kg, a 0.22 m, b 0.20 m, L 0.5 m, I 12 kg·m².
        const double weight = 110 * 9.80665;
        Accuracy.AgreesTo(6.5, 94.92837, Bifilar.LinearStiffness(weight, 0.22, 0.20, 0.5));
        Accuracy.AgreesTo(6.5, 16.54170, Bifilar.ExactTorque(weight, 0.22, 0.20, 0.5, double.DegreesToRadians(10))!.Value);
        Accuracy.AgreesTo(6.5, 70.94085, Bifilar.ExactTorque(weight, 0.22, 0.20, 0.5, double.DegreesToRadians(45))!.Value);
        Accuracy.AgreesTo(6, 2.233945, Bifilar.Period(12, Bifilar.LinearStiffness(weight, 0.22, 0.20, 0.5)));
    }

    [Theory] // measured: one suspended quadrotor (m 0.958 kg, a = b = 0.235 m, g 9.81) on two thread lengths, inertia as its builder worked out; a third craft
    [InlineData(0.958, 0.235, 0.51, 0.65845, 0.0112)]
    [InlineData(0.958, 0.235, 0.70, 1.0297, 0.0199)]
    [InlineData(0.2565, 0.325, 0.35, 0.8, 0.012311)]
    public void Measured_periods_give_the_inertia_worked_out_by_others(double mass, double half, double length, double period, double inertia) =>
        Assert.InRange(Bifilar.Inertia(period, Bifilar.LinearStiffness(mass * 9.81, half, half, length)) / inertia, 0.995, 1.005);

    [Fact]
    public void A_rod_hung_by_its_ends_swings_with_the_textbook_period()
    {
        // Uniform rod, length 2a, vertical threads L = 1 m: T = 2π √(L/(3 g)) = 1.158400945 s, whatever its mass and length.
        foreach ((double mass, double half) in new[] { (1.0, 0.5), (37, 1.7) })
            Accuracy.AgreesTo(9, 1.158400945, Bifilar.Period(mass * half * half / 3, Bifilar.LinearStiffness(mass * 9.80665, half, half, 1)));
    }

    [Fact]
    public void The_published_parafoil_stiffness_implies_its_riser_geometry()
    {
        // Montalvo & Costello, JGCD, doi 10.2514/1.G001545: 30 N·m/rad for a 90 kg cradle, so a b/L = 30/(90 g) = 0.03399 m; the linear law carries no more.
        Accuracy.AgreesTo(3.5, 30, Bifilar.LinearStiffness(90 * 9.80665, 0.2, 0.03399 * 5 * 0.5, 0.5));
    }

    [Fact]
    public void Exact_torque_is_odd_and_starts_with_the_linear_stiffness()
    {
        const double weight = 1000;
        double height = Math.Sqrt((0.5 * 0.5) - (0.02 * 0.02)); // at rest the threads span this height
        double small = Bifilar.ExactTorque(weight, 0.22, 0.20, 0.5, 1e-6)!.Value;
        Accuracy.AgreesTo(10, Bifilar.LinearStiffness(weight, 0.22, 0.20, height), small / 1e-6);
        Assert.Equal(-small, Bifilar.ExactTorque(weight, 0.22, 0.20, 0.5, -1e-6));
    }

    [Fact]
    public void Threads_too_short_for_the_twist_have_no_torque() => Assert.Null(Bifilar.ExactTorque(1000, 0.3, 0.3, 0.5, Math.PI));
}
