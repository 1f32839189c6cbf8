using System.Collections.Immutable;
using System.Globalization;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording.Web;

/// <summary>The local web page in English.</summary>
internal sealed partial record EnglishWebWords : WebWords
{
    public override string Status(int status, long mostUploadBytes, Numbers numbers) => status switch
    {
        400 => "The upload broke off or is no form. Nothing was kept; send it again.",
        403 => "This request did not come from a page of this program that is still open, and was refused. Open the page again.",
        404 => "There is no such page here. The steps of the job are at the top of the first page.",
        408 => "The upload was too slow and was given up. Nothing was kept; send it again.",
        413 => TooLarge(mostUploadBytes, numbers),
        415 => "Only forms of this page are taken. Open the page and drop the file there.",
        503 => "Too many flights are waiting already. Try again in a minute.",
        _ => "This is a fault of the program, please report it. Nothing was changed.",
    };

    public override string TooLarge(long mostUploadBytes, Numbers numbers) =>
        $"The upload is larger than the {numbers.Integer(mostUploadBytes >> 20)} MB that are taken, and was refused. Cut the log, pack it as a zip, or use the command line: trimfit fit.";

    public override string Phase(string code) => code switch
    {
        "waiting" => "Waiting for other flights",
        "reading" => "Reading the log",
        "measuring" => "Measuring the pull",
        "planning" => "Planning the card",
        "comparing" => "Comparing the flights",
        _ => "",
    };

    public override IReadOnlyList<string> Recognised(ImportDiagnostics diagnostics, Words words, Numbers numbers)
    {
        var lines = new List<string> { words.InspectAnswer(diagnostics, numbers) };
        foreach (InputFile file in diagnostics.Files)
        {
            lines.Add($"{file.Name}: {file.Format}.");
            lines.AddRange(file.LeftOut.Select(left => words.RowsLeftOut(file.Name, left, numbers)));
        }
        lines.AddRange(diagnostics.Sampling.Gaps.Select(gap => words.Gap(gap, numbers)));
        return lines;
    }

    public override string SheetTaken(string name) => $"Flight sheet: {name}.";

    public override string RulesRemembered(ImmutableArray<ColumnRule> rules) =>
        $"Read as you said for an earlier flight of this logger: {string.Join(", ", rules.Select(r => $"{r.Name} is {ChannelRoles.NameOf(r.Role)}{(r.Unit is null ? "" : " in " + r.Unit)}"))}.";

    public override string MachineWithFaults(int faults) => faults == 1 ? "The machine's readings have a fault; see Readings." : $"The machine's readings have {faults.ToString(CultureInfo.InvariantCulture)} faults; see Readings.";

    public override string Machine(string name, string file) => $"{name} ({file}).";

    public override string RoleOfColumn(string name) => $"What {name} is";

    public override string UnitOfColumn(string name) => $"Unit of {name}";

    public override string UnitDoesNotFit(string unit, string column, string role, IEnumerable<string> units) =>
        $"{column}: found \"{unit}\" as unit of {role}, expected one of {string.Join(", ", units)}.";

    public override string RoleTwice(string role, IReadOnlyList<string> columns) => $"{role} was given to {string.Join(" and ", columns)}; give it to one column.";

    public override string NoNumber(string field, string found) => $"{field}: found \"{found}\", expected a number with a decimal point, such as 12.5.";

    public override string AnswerName(int number, string files) => $"{number.ToString(CultureInfo.InvariantCulture)}: {files}";

    public override string AnswerTitle(string files) => $"Answer: {files}";

    public override string TravelOf(string part) => $"Travel: {part}";

    public override string TravelAxis(string unit) => $"travel [{unit}], right positive";

    public override string WhatIfPlotTitle => "Turn left over the travel";

    public override string WhatIfPlotCaption => "Turn left (middle of the range) over the travel of the part, one line for each power. Where a line crosses zero, the turn is gone at that power.";

    public override string JobName(long number, string machine, string customer) =>
        string.Join(", ", new[] { $"job {number.ToString(CultureInfo.InvariantCulture)}", machine, customer }.Where(t => t.Length > 0));

    public override string KeepStraight(long job) => $"and then keep it in job {job.ToString(CultureInfo.InvariantCulture)}, without positions";

    public override string OutcomeOf(string check) => $"Outcome: {check}";

    public override string NumberOf(string check) => $"Number found: {check}";

    public override string NoteOf(string check) => $"Note: {check}";

    public override string HangCheckCannotShow(string part) => $"{part}: does not move the CG under the wing, so a hang check cannot show it.";

    public override string RigGroup(string table) => table switch
    {
        "machine" => "Machine",
        "mass" => "Masses",
        "carabiners" => "Riser carabiners",
        "hang_points" => "Harness hang points",
        "propeller" => "Propeller, engine, thrust line",
        "hang_check" => "Hang check on two scales",
        "brakes" => "Brakes",
        "wing" => "Wing",
        _ => table,
    };

    public override string RigField(string name) => name switch
    {
        "name" => "Name of the machine",
        "machine.kind" => "Start",
        "machine.seats" => "Seats",
        "mass.pilot_kg" => "Pilot with all that hangs from the harness, kg",
        "mass.passenger_kg" => "Passenger, kg",
        "mass.power_unit_kg" => "Power unit without fuel, kg",
        "mass.fuel_kg" => "Fuel, kg",
        "mass.wheels_kg" => "Wheels, kg",
        "mass.power_unit_lateral_mm" => "Power unit's CG from the centre line, mm",
        "mass.cg_depth_mm" => "CG of all that hangs, below the riser carabiners, mm",
        "carabiners.left_mm" => "Left riser carabiner from the centre line, mm (negative)",
        "carabiners.right_mm" => "Right riser carabiner from the centre line, mm",
        "hang_points.front_left_mm" => "Front left harness hang point, mm (negative)",
        "hang_points.front_right_mm" => "Front right harness hang point, mm",
        "hang_points.front_offset_mm" => "or: middle of the front harness hang points, mm",
        "hang_points.rear_left_mm" => "Rear left harness hang point, mm (negative)",
        "hang_points.rear_right_mm" => "Rear right harness hang point, mm",
        "hang_points.rear_offset_mm" => "or: middle of the rear harness hang points, mm",
        "hang_points.front_share" => "Share of the pilot that the front harness hang points carry",
        "propeller.rotation" => "Rotation, seen from behind, looking the way it flies",
        "propeller.diameter_m" => "Diameter, m",
        "propeller.shaft_power_kw" => "Shaft power at full throttle, kW",
        "propeller.static_thrust_n" => "Static thrust at full throttle, N",
        "propeller.full_power_rpm" => "Speed at full power, rpm",
        "propeller.rpm_is" => "That speed, and the log's, is of the",
        "propeller.reduction_ratio" => "Engine turns per propeller turn",
        "propeller.drive" => "Drive",
        "propeller.thrust_line_mm" => "Propeller hub from the centre line, mm",
        "propeller.thrust_line_depth_mm" => "Propeller hub below the riser carabiners, mm",
        "propeller.hang_back_deg" => "Thrust axis up when hanging, deg",
        "propeller.cant_deg" => "Thrust axis turned in plan, deg (positive pushes to the right)",
        "hang_check.left_kg" => "Left scale, kg",
        "hang_check.right_kg" => "Right scale, kg",
        "hang_check.carabiner_spacing_mm" => "Between the riser carabiners in that check, mm",
        "brakes.full_travel_mm" => "Full brake travel, mm",
        "wing.name" => "Wing",
        "wing.area_m2" => "Flat area, m²",
        "wing.mass_kg" => "Mass of the wing, kg",
        "wing.trim_speed_m_s" => "Trim speed, m/s",
        "wing.glide_sink_m_s" => "Sink in glide, m/s",
        "wing.sensitivity_deg_s_per_mm" => "Turn per mm of CG shift, if it was measured, deg/s per mm",
        _ => "",
    };

    public override string RigWord(string word) => word switch
    {
        "foot_launch" => "on foot",
        "wheels" => "on wheels",
        "electrical" => "electrical field (pole pairs in the rig file)",
        _ => word,
    };

    public override string Range(double min, double max, string unit) =>
        string.Create(CultureInfo.InvariantCulture, $"{min} to {max}{(unit.Length == 0 ? "" : " ")}{unit}");

    public override string Question(string type) => type switch
    {
        "PullSide" => "Which way does it pull, as the seated pilot sees it?",
        "PullWhen" => "When does it pull?",
        "PullSince" => "Since when?",
        "ChangedPart" => "What was changed before it began?",
        "OtherWing" => "Another wing on this machine?",
        _ => type,
    };

    public override string Choice(string type, string code) => (type, code) switch
    {
        ("PullSide", "unknown") or ("PullSince", "unknown") => "not known",
        ("PullSide", "left") => "to the left",
        ("PullSide", "right") => "to the right",
        ("PullSide", "changing") => "now left, now right",
        ("PullWhen", "launch") => "while running and lifting off",
        ("PullWhen", "full_power") => "at full power",
        ("PullWhen", "level") => "in level flight",
        ("PullWhen", "engine_off") => "with the engine off",
        ("PullWhen", "accelerator") => "with the accelerator",
        ("PullSince", "always") => "from the first flight on",
        ("PullSince", "gradually") => "it grew little by little",
        ("PullSince", "suddenly") => "suddenly: from one flight to the next, or within one",
        ("PullSince", "after_change") => "since something was changed",
        ("ChangedPart", "geometry") => "riser carabiners, suspension bars, harness hang points, engine mounting",
        ("ChangedPart", "wing") => "the wing",
        ("ChangedPart", "brake_lines") => "brake lines",
        ("ChangedPart", "trimmers") => "trimmers",
        ("ChangedPart", "harness") => "harness",
        ("ChangedPart", "propeller") => "propeller or engine",
        ("ChangedPart", "ballast") => "ballast, bags, reserve",
        ("OtherWing", "not_tried") => "not tried",
        ("OtherWing", "same_pull") => "pulls the same way",
        ("OtherWing", "no_pull") => "does not pull",
        ("OtherWing", "other_way") => "pulls the other way",
        _ => code.Replace('_', ' '),
    };
}
