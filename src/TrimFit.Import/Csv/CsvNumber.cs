using System.Globalization;

namespace TrimFit.Import.Csv;

/// <summary>What a cell holds.</summary>
internal enum CellKind
{
    /// <summary>A number, perhaps with text behind it.</summary>
    Number,
    /// <summary>Nothing, or a word for nothing.</summary>
    Missing,
    /// <summary>Anything else.</summary>
    Text,
}

/// <summary>A strict parser of numbers in UTF-8: one decimal mark, no grouping, no culture.</summary>
/// <remarks>Grouping is refused because it is what turns <c>1,5</c> into 15 without a word.</remarks>
internal static class CsvNumber
{
    /// <summary>Largest power of ten that a double holds exactly.</summary>
    private const int ExactPower = 22;

    private static readonly double[] _powers = [.. Enumerable.Range(0, ExactPower + 1).Select(e => double.Parse(FormattableString.Invariant($"1e{e}"), CultureInfo.InvariantCulture))];

    // Words loggers write for "no value", lower case.
    private static readonly byte[][] _missing =
        [.. new[] { "-", "--", "---", "*", "**", "***", "n/a", "na", "#n/a", "nan", "-nan", "+nan", "nan(ind)", "-nan(ind)", "null", "none", "nil", "inf", "-inf", "+inf", "infinity", "-infinity", "?", ".", "–", "—", "∞", "\\n", "#value!", "#div/0!", "1.#qnan", "-1.#ind" }
            .Select(System.Text.Encoding.UTF8.GetBytes)];

    /// <summary>A number as digits and power of ten, before it is rounded to binary.</summary>
    /// <param name="Negative">Whether a minus stands before it.</param>
    /// <param name="Digits">The digits without the decimal mark.</param>
    /// <param name="Exponent">Power of ten that multiplies them.</param>
    public readonly record struct Parts(bool Negative, ulong Digits, int Exponent);

    /// <summary>Reads a cell that holds nothing but an ordinary number, by far the commonest; false says only that it needs <see cref="Parse"/>.</summary>
    /// <param name="cell">The cell's bytes.</param>
    /// <param name="decimalMark">The file's decimal mark.</param>
    /// <param name="value">The number, correctly rounded.</param>
    public static bool TryParseOrdinary(ReadOnlySpan<byte> cell, byte decimalMark, out double value)
    {
        value = 0;
        if ((uint)(cell.Length - 1) > 15) // up to 15 digits are below 2^53
            return false;
        int i = cell[0] == (byte)'-' ? 1 : 0;
        ulong digits = 0;
        int behind = 0, step = 0, count = 0;
        for (; i < cell.Length; i++)
        {
            uint digit = (uint)(cell[i] - '0');
            if (digit <= 9)
            {
                digits = digits * 10 + digit;
                behind += step;
                count++;
            }
            else if (cell[i] == decimalMark && step == 0)
            {
                step = 1;
            }
            else
            {
                return false;
            }
        }
        if (count == 0 || digits > 1UL << 53)
            return false;
        value = digits / _powers[behind]; // both exact, rounded once
        if (cell[0] == (byte)'-')
            value = -value;
        return true;
    }

    /// <summary>Reads a cell.</summary>
    /// <param name="cell">The cell's bytes, without quotes.</param>
    /// <param name="decimalMark">The file's decimal mark: <c>.</c> or <c>,</c>.</param>
    /// <param name="value">The number, correctly rounded; NaN when there is none.</param>
    /// <param name="suffix">Text behind the number without spaces around it, empty when none; the whole cell when it is text.</param>
    public static CellKind Parse(ReadOnlySpan<byte> cell, byte decimalMark, out double value, out ReadOnlySpan<byte> suffix)
    {
        if (TryReadParts(cell, decimalMark, out Parts parts, out int start, out int end, out bool exact))
        {
            suffix = end == cell.Length ? default : Trim(cell[end..]);
            value = exact && parts.Digits <= 1UL << 53 && parts.Exponent is >= -ExactPower and <= ExactPower
                ? Scale(parts)
                : Fallback(cell[start..end], decimalMark);
            if (double.IsFinite(value))
                return CellKind.Number;
        }
        value = double.NaN;
        suffix = Trim(cell);
        return IsMissing(suffix) ? CellKind.Missing : CellKind.Text;
    }

    /// <summary>Reads the digits of a cell that holds nothing but a number of at most 19 digits.</summary>
    public static bool TryParseParts(ReadOnlySpan<byte> cell, byte decimalMark, out Parts parts) =>
        TryReadParts(cell, decimalMark, out parts, out _, out int end, out bool exact) && exact && Trim(cell[end..]).IsEmpty;

    /// <summary>Whether the cell is empty or says that there is no value.</summary>
    public static bool IsMissing(ReadOnlySpan<byte> cell)
    {
        cell = Trim(cell);
        if (cell.IsEmpty)
            return true;
        if (cell.Length > 12)
            return false;
        Span<byte> lower = stackalloc byte[cell.Length];
        for (int i = 0; i < cell.Length; i++)
            lower[i] = cell[i] is >= (byte)'A' and <= (byte)'Z' ? (byte)(cell[i] | 0x20) : cell[i];
        foreach (byte[] word in _missing)
        {
            if (lower.SequenceEqual(word))
                return true;
        }
        return false;
    }

    /// <summary>The cell without spaces, tabs and no-break spaces around it.</summary>
    public static ReadOnlySpan<byte> Trim(ReadOnlySpan<byte> cell)
    {
        int start = 0, end = cell.Length;
        while (start < end)
        {
            if (cell[start] is (byte)' ' or (byte)'\t')
                start++;
            else if (cell[start] == 0xC2 && start + 1 < end && cell[start + 1] == 0xA0)
                start += 2;
            else
                break;
        }
        while (end > start)
        {
            if (cell[end - 1] is (byte)' ' or (byte)'\t')
                end--;
            else if (cell[end - 1] == 0xA0 && end - 2 >= start && cell[end - 2] == 0xC2)
                end -= 2;
            else
                break;
        }
        return cell[start..end];
    }

    private static double Scale(Parts parts)
    {
        // Both operands are exact and IEEE division and multiplication round once, so the result is the nearest double (Clinger 1990).
        double digits = parts.Digits;
        double value = parts.Exponent < 0 ? digits / _powers[-parts.Exponent] : digits * _powers[parts.Exponent];
        return parts.Negative ? -value : value;
    }

    private static double Fallback(ReadOnlySpan<byte> number, byte decimalMark)
    {
        if (number.Length > 512)
            return double.NaN;
        Span<byte> copy = stackalloc byte[number.Length];
        number.CopyTo(copy);
        if (decimalMark != (byte)'.')
            copy.Replace(decimalMark, (byte)'.');
        return double.TryParse(copy, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) ? value : double.NaN;
    }

    private static bool TryReadParts(ReadOnlySpan<byte> cell, byte decimalMark, out Parts parts, out int start, out int end, out bool exact)
    {
        int i = 0;
        while (i < cell.Length && cell[i] is (byte)' ' or (byte)'\t')
            i++;
        start = i;
        bool negative = false;
        if (i < cell.Length && cell[i] is (byte)'-' or (byte)'+')
            negative = cell[i++] == (byte)'-';
        else if (cell.Length - i > 3 && cell[i] == 0xE2 && cell[i + 1] == 0x88 && cell[i + 2] == 0x92) // U+2212 MINUS SIGN
        {
            negative = true;
            i += 3;
            start = i;
        }
        ulong digits = 0;
        int count = 0, significant = 0, exponent = 0;
        for (; i < cell.Length && (uint)(cell[i] - '0') <= 9; i++, count++)
        {
            digits = digits * 10 + (uint)(cell[i] - '0');
            significant += significant > 0 || cell[i] != (byte)'0' ? 1 : 0;
        }
        if (i < cell.Length && cell[i] == decimalMark)
        {
            i++;
            for (; i < cell.Length && (uint)(cell[i] - '0') <= 9; i++, count++, exponent--)
            {
                digits = digits * 10 + (uint)(cell[i] - '0');
                significant += significant > 0 || cell[i] != (byte)'0' ? 1 : 0;
            }
        }
        exact = significant <= 19; // 10^19 − 1 fits in 64 bits
        end = i;
        if (count == 0)
        {
            parts = default;
            return false;
        }
        if (i + 1 < cell.Length && (cell[i] | 0x20) == 'e')
        {
            int j = i + 1;
            bool down = false;
            if (cell[j] is (byte)'-' or (byte)'+')
                down = cell[j++] == (byte)'-';
            int power = 0, from = j;
            for (; j < cell.Length && (uint)(cell[j] - '0') <= 9 && power < 10000; j++)
                power = power * 10 + (cell[j] - '0');
            if (j > from)
            {
                exponent += down ? -power : power;
                end = j;
            }
        }
        parts = new(negative, digits, exponent);
        return true;
    }
}
