using System.CommandLine;
using System.CommandLine.Invocation;
using TrimFit.Jobs;

namespace TrimFit.Cli;

/// <summary>The command <c>job</c> and its verbs.</summary>
internal static class JobCommandTree
{
    public static Command Create(TextWriter output, TextWriter error) => new("job", "The workshop's job book: one file with complaint, setups, flights, results, adjustments and sign-off.")
    {
        Open(output, error), Measure(output, error), Checks(output, error), Add(output, error), Adjust(output, error), Show(output, error), List(output, error), Compare(output, error), History(output, error), Sign(output, error),
        Export(output, error), Import(output, error), Delete(output, error),
    };

    private static Command Open(TextWriter output, TextWriter error)
    {
        Option<string> complaint = Words("--complaint", "What the customer complains about, in his words.", "TEXT"), machine = Words("--machine", "The machine, as the workshop calls it.", "TEXT");
        complaint.Required = machine.Required = true;
        Option<string> customer = Words("--customer", "Whose it is.", "NAME"), wing = Words("--wing", "The wing flown with it, such as type and size.", "TEXT"), wingId = WingId(), note = Note();
        Option<string> rig = Words("--rig", "The machine as measured: a rig file (TOML). May come later (trimfit job measure).", "RIG");
        var own = new JobOptions(error);
        var command = new Command("open", "Open a job; the first one makes the book.") { complaint, machine, customer, wing, wingId, rig, note };
        own.Add(command);
        command.SetAction(parsed => JobWork.Open(own.Choices(parsed), new()
        {
            Number = 0,
            Uid = "",
            Opened = default,
            Complaint = parsed.GetValue(complaint)!,
            Machine = parsed.GetValue(machine)!,
            Customer = parsed.GetValue(customer) ?? "",
            Wing = parsed.GetValue(wing) ?? "",
            WingId = parsed.GetValue(wingId) ?? "",
        }, parsed.GetValue(rig), parsed.GetValue(note), output));
        return command;
    }

    private static Command Measure(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        Option<string> rig = Words("--rig", "The machine as measured: a rig file (TOML).", "RIG"), note = Note();
        Option<string[]> reading = Reading("Reading that takes the place of the one in the rig file, such as hang_check.left_kg=56.3,56.1. May be given more than once.");
        var evenSo = new Option<bool>("--even-so") { Description = "Write readings down although they contradict each other." };
        var own = new JobOptions(error);
        var command = new Command("measure", "Write down the machine as measured: a new setup, never a change of an old one.") { job, rig, reading, evenSo, note };
        own.Add(command);
        command.SetAction(parsed => JobWork.Measure(own.Choices(parsed), Number(parsed, job), parsed.GetValue(rig), parsed.GetValue(reading) ?? [], parsed.GetValue(evenSo), parsed.GetValue(note), output));
        return command;
    }

    /// <summary>The sheet of checks; with a job's number and outcomes, their record.</summary>
    private static Command Checks(TextWriter output, TextWriter error)
    {
        Command command = JobCommands.Checks(output, error);
        var sheet = (SynchronousCommandLineAction)command.Action!;
        Argument<string?> job = new("JOB") { Description = "Number of the job whose checks are written down; without one, only the sheet is shown.", Arity = ArgumentArity.ZeroOrOne };
        var done = new Option<string[]>("--done")
        {
            Description = "A check that was made: its word, what came out (pass, fail, not_done) and the number found, such as brake_lines=pass:4mm. May be given more than once.",
            HelpName = "CHECK=OUTCOME[:NUMBER]",
        };
        Option<string> by = Words("--by", "Who did it.", "NAME"), note = Note();
        var own = new JobOptions(error);
        command.Arguments.Add(job);
        command.Options.Add(done);
        command.Options.Add(by);
        command.Options.Add(note);
        own.AddBook(command);
        command.SetAction(parsed =>
        {
            string[] made = parsed.GetValue(done) ?? [];
            if (made.Length == 0)
                return sheet.Invoke(parsed);
            long number = Whole("JOB", parsed.GetValue(job) ?? throw new CommandLineException("job checks --done: name the job the checks belong to, such as trimfit job checks 1 --done brake_lines=pass."));
            return JobChecks.Run(own.Choices(parsed), number, made, parsed.GetValue(by) ?? "", parsed.GetValue(note) ?? "", output);
        });
        return command;
    }

    private static Command Add(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        var logs = new Argument<string[]>("LOG") { Description = "Flight logs: one file, or one for each logger of the same flight.", Arity = ArgumentArity.OneOrMore };
        Option<string> sheet = Words("--sheet", "What the pilot did: a flight sheet (TOML).", "SHEET"), rig = Words("--rig", "The machine as measured, when it is another setup than the last.", "RIG");
        Option<string> setup = Words("--setup", "Number of the setup it was flown with (the last one).", "N"), wingId = WingId();
        var forget = new Option<bool>("--forget-place") { Description = "Keep the turn data without the coordinates." };
        var alone = new Option<bool>("--without-memory") { Description = "Leave the workshop's own jobs out of the sensitivity." };
        var own = new JobOptions(error, logs: true);
        var command = new Command("add", "Add a flight: fit it, and keep logs, sheet and result.") { job, logs, sheet, rig, setup, wingId, forget, alone };
        own.Add(command);
        command.SetAction(parsed => JobAdd.Run(own.Choices(parsed), Number(parsed, job), new()
        {
            Logs = parsed.GetValue(logs)!,
            Sheet = parsed.GetValue(sheet),
            Rig = parsed.GetValue(rig),
            Setup = parsed.GetValue(setup) is string text ? (int)Whole("--setup", text) : null,
            WingId = parsed.GetValue(wingId) ?? "",
            ForgetPlace = parsed.GetValue(forget),
            WithMemory = !parsed.GetValue(alone),
        }, output));
        return command;
    }

    private static Command Adjust(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        Option<string> part = Words("--part", "Which part was moved: carabiner_pair, carabiner_one_side, bar_spacer, harness_front, harness_front_rear, power_unit, engine_cant, ballast, trimmer or brake_line.", "KIND");
        part.Required = true;
        Option<string[]> reading = Reading("Reading after, as measured and not as intended, such as carabiners.left_mm=-227. For a part that is not in the rig file: travel=7, right positive.");
        Option<string> rig = Words("--rig", "The rig file after, instead of readings.", "RIG"), by = Words("--by", "Who did it.", "NAME"), note = Note();
        var confirm = new Option<bool>("--confirm") { Description = "The readings were taken again and stand, although they are more than one step off the recommendation." };
        var own = new JobOptions(error);
        var command = new Command("adjust", "Write down an adjustment by its readings: a new setup.") { job, part, reading, rig, by, note, confirm };
        own.Add(command);
        command.SetAction(parsed => JobAdjust.Run(own.Choices(parsed), Number(parsed, job), new()
        {
            Part = parsed.GetValue(part)!,
            Readings = parsed.GetValue(reading) ?? [],
            Rig = parsed.GetValue(rig),
            By = parsed.GetValue(by) ?? "",
            Note = parsed.GetValue(note) ?? "",
            Confirmed = parsed.GetValue(confirm),
        }, output));
        return command;
    }

    private static Command Show(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        Option<string> customer = Words("--customer", "Write the page the customer gets: .html or .md.", "FILE");
        var own = new JobOptions(error);
        var command = new Command("show", "Everything about one job, and the page for the customer.") { job, customer };
        own.Add(command, report: true);
        command.SetAction(parsed => JobWork.Show(own.Choices(parsed), Number(parsed, job), parsed.GetValue(customer), output));
        return command;
    }

    private static Command List(TextWriter output, TextWriter error)
    {
        var unsigned = new Option<bool>("--open") { Description = "Only jobs whose machine, as it is now, nobody has signed for." };
        Option<string> having = Words("--with", "Only jobs with this text in machine, customer, wing or complaint.", "TEXT");
        var own = new JobOptions(error);
        var command = new Command("list", "Every job in one line, newest first.") { unsigned, having };
        own.Add(command);
        command.SetAction(parsed => JobWork.List(own.Choices(parsed), parsed.GetValue(unsigned), parsed.GetValue(having) ?? "", output));
        return command;
    }

    private static Command Compare(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        Option<string> flights = Words("--flights", "Flights to compare, in the order flown (all of the job).", "N,N");
        Option<string> changed = Words("--changed", "What was changed; without it, what the adjustments say.", "WHAT");
        Option<string> scatter = Words("--flight-scatter", "Known scatter of an unchanged machine's pull from flight to flight, deg/s; without it what is usual is assumed.", "DEG_S");
        var own = new JobOptions(error);
        var command = new Command("compare", "Did the adjustment work? The job's flights by their setups, kept as a further result.") { job, flights, changed, scatter };
        own.AddForFit(command);
        command.SetAction(parsed => JobCompare.Run(own.Choices(parsed), Number(parsed, job), parsed.GetValue(flights), CommonOptions.Changed(parsed.GetValue(changed)),
            CommonOptions.Scatter(parsed.GetValue(scatter)), output));
        return command;
    }

    private static Command History(TextWriter output, TextWriter error)
    {
        Argument<string?> job = new("JOB") { Description = "Number of the job.", Arity = ArgumentArity.ZeroOrOne };
        Option<string> wingId = WingId();
        var memory = new Option<bool>("--memory") { Description = "What the workshop's own jobs say about turn per shift." };
        var own = new JobOptions(error);
        var command = new Command("history", "What was done, in the order of time: of one job, or of every job of a wing.") { job, wingId, memory };
        own.Add(command);
        command.SetAction(parsed => JobWork.History(own.Choices(parsed), parsed.GetValue(job) is string text ? Whole("JOB", text) : null, parsed.GetValue(wingId), parsed.GetValue(memory), output));
        return command;
    }

    private static Command Sign(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        Option<string> name = Words("--name", "The technician who signs.", "NAME"), date = Words("--date", "The date to sign with (today).", "YYYY-MM-DD"), note = Note();
        name.Required = true;
        Option<string[]> reading = Reading("Reading to sign for; without any, those of the machine as it is now.");
        var own = new JobOptions(error);
        var command = new Command("sign", "Sign a job off in the technician's name: the word is the technician's, not TrimFit's.") { job, name, date, reading, note };
        own.Add(command);
        command.SetAction(parsed => JobWork.Sign(own.Choices(parsed), Number(parsed, job), parsed.GetValue(name)!, parsed.GetValue(date), parsed.GetValue(reading) ?? [], parsed.GetValue(note), output));
        return command;
    }

    private static Command Export(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        var file = new Option<string>("--out") { Description = "The zip to write.", Required = true, HelpName = "FILE.zip" };
        var own = new JobOptions(error);
        var command = new Command("export", "Write a job with all its files as one zip.") { job, file };
        own.Add(command);
        command.SetAction(parsed => JobExchange.Export(own.Choices(parsed), Number(parsed, job), parsed.GetValue(file)!, output));
        return command;
    }

    private static Command Import(TextWriter output, TextWriter error)
    {
        var file = new Argument<string>("FILE.zip") { Description = "The zip that \"job export\" wrote." };
        Option<string> most = Words("--most-megabytes", "What the zip may unpack to (2048).", "N");
        var own = new JobOptions(error);
        var command = new Command("import", "Put a job from another book into this one.") { file, most };
        own.Add(command);
        command.SetAction(parsed => JobExchange.Import(own.Choices(parsed), parsed.GetValue(file)!,
            parsed.GetValue(most) is string text ? Whole("--most-megabytes", text) << 20 : JobZip.UsualMostBytes, output));
        return command;
    }

    private static Command Delete(TextWriter output, TextWriter error)
    {
        Argument<string> job = Job();
        var yes = new Option<bool>("--yes") { Description = "Do it: nothing brings the job back." };
        var own = new JobOptions(error);
        var command = new Command("delete", "Delete a job with every log that no other job uses.") { job, yes };
        own.Add(command);
        command.SetAction(parsed => JobExchange.Delete(own.Choices(parsed), Number(parsed, job), parsed.GetValue(yes), output));
        return command;
    }

    internal static Argument<string> Job() => new("JOB") { Description = "Number of the job (trimfit job list)." };

    internal static long Number(ParseResult parsed, Argument<string> job) => Whole("JOB", parsed.GetValue(job)!);

    internal static Option<string> Words(string name, string description, string help) => new(name) { Description = description, HelpName = help };

    private static Option<string> Note() => Words("--note", "Anything else.", "TEXT");

    private static Option<string> WingId() => Words("--wing-id", "What tells this wing from others of its kind, such as its serial number.", "TEXT");

    private static Option<string[]> Reading(string description) => new("--reading") { Description = description, HelpName = "KEY=VALUE" };

    private static long Whole(string name, string text) => long.TryParse(text, System.Globalization.NumberStyles.None, System.Globalization.CultureInfo.InvariantCulture, out long number) && number is > 0 and < 1_000_000_000
        ? number : throw new CommandLineException($"{name}: found \"{text}\", expected a whole number above 0.");
}
