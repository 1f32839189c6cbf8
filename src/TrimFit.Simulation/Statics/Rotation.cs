namespace TrimFit.Simulation;

/// <summary>A rotation from body axes to outer axes by yaw, then pitch, then roll (aerospace order), each positive to the right or nose up.</summary>
internal readonly record struct Rotation(Vector Row1, Vector Row2, Vector Row3)
{
    public static Rotation FromAngles(double roll, double pitch, double yaw)
    {
        (double sr, double cr) = Math.SinCos(roll);
        (double sp, double cp) = Math.SinCos(pitch);
        (double sy, double cy) = Math.SinCos(yaw);
        return new(
            new(cy * cp, (cy * sp * sr) - (sy * cr), (cy * sp * cr) + (sy * sr)),
            new(sy * cp, (sy * sp * sr) + (cy * cr), (sy * sp * cr) - (cy * sr)),
            new(-sp, cp * sr, cp * cr));
    }

    /// <summary>A body vector in outer axes.</summary>
    public Vector Outward(Vector v) => new(Dot(Row1, v), Dot(Row2, v), Dot(Row3, v));

    /// <summary>An outer vector in body axes.</summary>
    public Vector Inward(Vector v) => (v.X * Row1) + (v.Y * Row2) + (v.Z * Row3);

    private static double Dot(Vector a, Vector b) => (a.X * b.X) + (a.Y * b.Y) + (a.Z * b.Z);
}
