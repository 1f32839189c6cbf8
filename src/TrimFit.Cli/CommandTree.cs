using System.CommandLine;
using TrimFit.Cli.Batch;

namespace TrimFit.Cli;

/// <summary>Commands and their options; one table of what the program understands.</summary>
internal static class CommandTree
{
    public static RootCommand Create(TextWriter output, TextWriter error)
    {
        var root = new RootCommand("TrimFit measures a paramotor's pull to one side from an ordinary flight's log and says which part to move, which way and how far.")
        {
            Inspect(output), Fit(output, error), Compare(output, error), Rig(output, error), Card(output, error), Synth(error), Batch(output, error), JobCommandTree.Create(output, error), Serve(output, error),
        };
        return root;
    }

    private static Command Inspect(TextWriter output)
    {
        Argument<string[]> logs = Logs();
        var common = new CommonOptions();
        var command = new Command("inspect", "What was read: columns, units, rates, gaps, clocks, sensors, wind.") { logs };
        common.AddForPeople(command);
        common.AddForLogs(command);
        command.SetAction(parsed => InspectCommand.Run(parsed.GetValue(logs)!, common.Choices(parsed), output));
        return command;
    }

    private static Command Fit(TextWriter output, TextWriter error)
    {
        Argument<string[]> logs = Logs("Flight logs: one file, or one for each logger of the same flight; or a report page, to run it again.");
        var rig = new Option<string?>("--rig") { Description = "The machine: a rig file (TOML).", HelpName = "RIG" };
        var sheet = new Option<string?>("--sheet") { Description = "What the pilot did: a flight sheet (TOML).", HelpName = "SHEET" };
        var card = new Option<string?>("--card") { Description = "The test card that was flown (JSON): says whether its precision was reached, and the next best leg.", HelpName = "CARD" };
        var customer = new Option<string?>("--customer") { Description = "Write the page a workshop hands over: .html or .md.", HelpName = "FILE" };
        var forget = new Option<bool>("--forget-place") { Description = "Drop positions before anything is measured or written; turn and speed stay." };
        var common = new CommonOptions();
        var command = new Command("fit", "One flight (one or more loggers of it): the pull over power and the shift that nulls it.") { logs, rig, sheet, card, customer, forget };
        common.AddForPeople(command);
        common.AddForLogs(command);
        common.AddForFit(command);
        command.SetAction(parsed => FitCommand.Run(parsed.GetValue(logs)!, parsed.GetValue(rig), parsed.GetValue(sheet), parsed.GetValue(card),
            parsed.GetValue(customer) is string page ? CommonOptions.ReportPath("--customer", page) : null, parsed.GetValue(forget), common.Choices(parsed), output, error));
        return command;
    }

    private static Command Compare(TextWriter output, TextWriter error)
    {
        var list = new Argument<string?>("FLIGHTS") { Description = "A list of flights (TOML): [[flight]] with logs, rig, sheet, setup.", Arity = ArgumentArity.ZeroOrOne };
        Option<string[]> Logs(string name, string which) => new(name) { Description = $"Logs of the flight {which} the change.", HelpName = "LOG", AllowMultipleArgumentsPerToken = true };
        Option<string?> File(string name, string what, string help) => new(name) { Description = what, HelpName = help };
        Option<string[]> before = Logs("--before", "before"), after = Logs("--after", "after");
        Option<string?> beforeRig = File("--before-rig", "The machine before the change.", "RIG"), afterRig = File("--after-rig", "The machine after it; that before when left out.", "RIG");
        Option<string?> beforeSheet = File("--before-sheet", "Flight sheet of the flight before.", "SHEET"), afterSheet = File("--after-sheet", "Flight sheet of the flight after.", "SHEET");
        Option<string?> changed = File("--changed", "What was changed; the change is put down to it, everything else that differs is warned of.", "WHAT");
        Option<string?> scatter = File("--flight-scatter", "Known scatter of an unchanged machine's pull from flight to flight, deg/s; without it what is usual is assumed.", "DEG_S");
        var common = new CommonOptions();
        var command = new Command("compare", "Before and after: did the change work, and what comes next. Two flights, or a list of more.")
        {
            list, before, beforeRig, beforeSheet, after, afterRig, afterSheet, changed, scatter,
        };
        common.AddForPeople(command);
        common.AddForLogs(command);
        common.AddForFit(command);
        command.SetAction(parsed => CompareCommand.Run(new CompareRequest
        {
            List = parsed.GetValue(list),
            Before = [.. parsed.GetValue(before) ?? []],
            BeforeRig = parsed.GetValue(beforeRig),
            BeforeSheet = parsed.GetValue(beforeSheet),
            After = [.. parsed.GetValue(after) ?? []],
            AfterRig = parsed.GetValue(afterRig),
            AfterSheet = parsed.GetValue(afterSheet),
            Changed = CommonOptions.Changed(parsed.GetValue(changed)),
            Scatter = CommonOptions.Scatter(parsed.GetValue(scatter)),
        }, common.Choices(parsed), output, error));
        return command;
    }

    private static Command Rig(TextWriter output, TextWriter error)
    {
        var rig = new Argument<string>("RIG") { Description = "The machine: a rig file (TOML)." };
        var common = new CommonOptions();
        var command = new Command("rig", "Statics and adjustment table of a machine without a flight.") { rig };
        common.AddForPeople(command);
        common.AddSeed(command);
        var ground = new MeasureOptions();
        ground.AddTo(command);
        command.SetAction(parsed => RigCommand.Run(parsed.GetValue(rig)!, ground.Choices(parsed), common.Choices(parsed), output, error));
        return command;
    }

    private static Command Card(TextWriter output, TextWriter error)
    {
        var options = new CardCommandOptions();
        var common = new CommonOptions();
        var command = new Command("card", "A test card: what to fly for a wanted precision, and the precision to expect.");
        options.AddTo(command);
        common.AddForPeople(command);
        common.AddForFit(command);
        command.SetAction(parsed => CardCommand.Run(options.Choices(parsed, common.Choices(parsed)), common.Choices(parsed), output, error));
        return command;
    }

    private static Command Synth(TextWriter error)
    {
        var scenario = new Argument<string>("SCENARIO") { Description = "The flight to make up: a scenario file (TOML)." };
        var folder = new Option<string>("--out") { Description = "Folder for log, rig file, flight sheet and truth.", Required = true, HelpName = "DIR" };
        var common = new CommonOptions();
        var command = new Command("synth", "A made-up flight with known truth.") { scenario, folder };
        common.AddSeed(command);
        common.AddQuiet(command);
        command.SetAction(parsed => SynthCommand.Run(parsed.GetValue(scenario)!, parsed.GetValue(folder)!, common.Choices(parsed), error));
        return command;
    }

    private static Command Batch(TextWriter output, TextWriter error)
    {
        var paths = new Argument<string[]>("PATH") { Description = "Logs, one flight each; names may hold * and ?.", Arity = ArgumentArity.ZeroOrMore };
        var list = new Option<string?>("--list") { Description = "A text file with one log a line.", HelpName = "FILE" };
        var rig = new Option<string>("--rig") { Description = "The machine: a rig file (TOML).", Required = true, HelpName = "RIG" };
        var folder = new Option<string>("--out") { Description = "Folder for flights.csv, flights.parquet and the journal that a run goes on from.", Required = true, HelpName = "DIR" };
        var threads = new Option<string?>("--threads") { Description = "Flights worked on at once (the processor's cores).", HelpName = "N" };
        var common = new CommonOptions();
        var command = new Command("batch", "Many flights, in parallel, one result row each; goes on where it was when run again.") { paths, list, rig, folder, threads };
        common.AddForReading(command);
        common.AddForLogs(command);
        common.AddForFit(command);
        command.SetAction(parsed =>
        {
            string[] patterns = [.. parsed.GetValue(paths) ?? [], .. parsed.GetValue(list) is string file ? BatchFlight.Listed(file) : []];
            if (patterns.Length == 0)
                throw new CommandLineException("batch: no log is named. Name logs, patterns such as \"logs/*.csv\", or a list with --list.");
            return BatchCommand.Run(BatchFlight.From(patterns, parsed.GetValue(rig)!), parsed.GetValue(folder)!, CommonOptions.Threads(parsed.GetValue(threads)),
                common.Choices(parsed), output, error);
        });
        return command;
    }

    private static Command Serve(TextWriter output, TextWriter error)
    {
        var port = new Option<string?>("--port") { Description = $"Port ({Web.WebOptions.UsualPort}, or any free one when it is taken).", HelpName = "N" };
        var noBrowser = new Option<bool>("--no-browser") { Description = "Only print the address." };
        var listen = new Option<string?>("--listen") { Description = "Another address of this machine, to be reached from other machines; needs a token.", HelpName = "ADDRESS" };
        var token = new Option<string?>("--token") { Description = "Who opens the page must know it; a random one is made for --listen.", HelpName = "TEXT" };
        var book = new Option<string?>("--book") { Description = "The job book.", HelpName = "FILE" };
        var noBook = new Option<bool>("--no-book") { Description = "Without a job book." };
        var command = new Command("serve", "The same work in a local web page, on this machine only.") { port, noBrowser, listen, token, book, noBook };
        command.SetAction(parsed => ServeCommand.Run(new ServeRequest
        {
            Port = parsed.GetValue(port),
            NoBrowser = parsed.GetValue(noBrowser),
            Listen = parsed.GetValue(listen),
            Token = parsed.GetValue(token),
            Book = parsed.GetValue(book),
            NoBook = parsed.GetValue(noBook),
        }, output, error));
        return command;
    }

    private static Argument<string[]> Logs(string description = "Flight logs: one file, or one for each logger of the same flight.") =>
        new("LOG") { Description = description, Arity = ArgumentArity.OneOrMore };
}
