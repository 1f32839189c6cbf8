using System.Runtime.InteropServices;

namespace TrimFit.Import.Csv;

/// <summary>Columns of long logs in huge pages where Linux offers them on demand: first touch of fresh memory in small pages takes longer than the parsing.</summary>
/// <remarks>A hint only: the garbage collector's memory stays what it is, and any refusal is ignored (madvise(2), MADV_HUGEPAGE).</remarks>
internal static partial class HugePages
{
    private const int Advice = 14;        // MADV_HUGEPAGE
    private const long PageBytes = 2 << 20;

    /// <summary>A new column, zero everywhere.</summary>
    public static unsafe double[] Column(int length)
    {
        double[] column = new double[length];
        if (!OperatingSystem.IsLinux() || (long)length * sizeof(double) < 2 * PageBytes)
            return column;
        fixed (double* start = column)
        {
            long first = ((long)start + PageBytes - 1) / PageBytes * PageBytes;
            long last = ((long)start + ((long)length * sizeof(double))) / PageBytes * PageBytes;
            if (last > first)
                _ = Advise((nint)first, (nuint)(last - first), Advice);
        }
        return column;
    }

    [LibraryImport("libc", EntryPoint = "madvise")]
    private static partial int Advise(nint address, nuint length, int advice);
}
