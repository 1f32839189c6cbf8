using TrimFit.Core.Analysis;
using TrimFit.Reporting.Wording;

namespace TrimFit.Web.Steps;

/// <summary>The rows of "what if I move this" as people read them.</summary>
internal sealed record WhatIfView(IReadOnlyList<string> Heads, IReadOnlyList<IReadOnlyList<string>> Cells)
{
    public static WhatIfView Of(AdjustmentReport way, IReadOnlyList<WhatIfRow> rows, Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        bool newtons = way.RiserLoadLeftN is not null;
        List<string> heads = [l.Travel, .. way.TurnLeftAt.Select(t => $"{words.Setting(t.Setting)} deg/s")];
        if (newtons)
            heads.AddRange([l.TwistRatio, l.TwistUpTo, $"{l.RiserLoadLeft} {numbers.ForceUnit}", $"{l.RiserLoadRight} {numbers.ForceUnit}"]);
        heads.AddRange([$"{l.HangCheckLeft} {numbers.MassUnit}", $"{l.HangCheckRight} {numbers.MassUnit}", l.Limit]);
        return new(heads, [.. rows.Select(r => Row(r, way, newtons, words, numbers))]);
    }

    private static List<string> Row(WhatIfRow row, AdjustmentReport way, bool newtons, Words words, Numbers numbers)
    {
        Labels l = words.Labels;
        StateAfterTravel s = row.State;
        List<string> cells = [row.Travel == 0 ? l.Now : words.Travel(row.Travel, way.Unit, numbers),
            .. s.TurnLeftAt.Select(t => $"{numbers.RateNumber(t.RateRadPerSec!.Value)} ({numbers.RateRange(t.Interval95!.Value, l.To)})")];
        if (newtons)
        {
            cells.AddRange([numbers.Plain(s.TwistRatio!.Value, 2), numbers.Plain(s.TwistRatioHigh95!.Value, 2),
                numbers.ForceNumber(s.RiserLoadLeftN!.Value), numbers.ForceNumber(s.RiserLoadRightN!.Value)]);
        }
        cells.AddRange([numbers.MassNumber(s.HangCheckLeftKg), numbers.MassNumber(s.HangCheckRightKg),
            row.WithinLimits switch { null => l.LimitNotGiven, true => l.LimitInside, false => l.LimitBeyond }]);
        return cells;
    }
}
