using System.Collections.Immutable;
using TrimFit.Core.Logs;
using TrimFit.Core.Rigging;

namespace TrimFit.Reporting.Wording.Web;

/// <summary>What people read on the local web page, in one language.</summary>
internal abstract record WebWords
{
    /// <summary>Titles, questions and single words.</summary>
    public abstract WebLabels Labels { get; }

    /// <summary>What an HTTP status means for the person.</summary>
    public abstract string Status(int status, long mostUploadBytes, Numbers numbers);

    /// <summary>An upload that is larger than allowed.</summary>
    public abstract string TooLarge(long mostUploadBytes, Numbers numbers);

    /// <summary>What is being done; empty when nothing is.</summary>
    public abstract string Phase(string code);

    /// <summary>What was recognised in a flight, a sentence each.</summary>
    public abstract IReadOnlyList<string> Recognised(ImportDiagnostics diagnostics, Words words, Numbers numbers);

    /// <summary>A flight sheet came with the logs.</summary>
    public abstract string SheetTaken(string name);

    /// <summary>Columns are read as a person once said.</summary>
    public abstract string RulesRemembered(ImmutableArray<ColumnRule> rules);

    /// <summary>A machine whose rig file has faults.</summary>
    public abstract string MachineWithFaults(int faults);

    /// <summary>The machine that is taken.</summary>
    public abstract string Machine(string name, string file);

    /// <summary>Label of a column's role.</summary>
    public abstract string RoleOfColumn(string name);

    /// <summary>Label of a column's unit.</summary>
    public abstract string UnitOfColumn(string name);

    /// <summary>A unit that no column of the role can have.</summary>
    public abstract string UnitDoesNotFit(string unit, string column, string role, IEnumerable<string> units);

    /// <summary>Two columns for one role.</summary>
    public abstract string RoleTwice(string role, IReadOnlyList<string> columns);

    /// <summary>A text that is no number.</summary>
    public abstract string NoNumber(string field, string found);

    /// <summary>An answer among others.</summary>
    public abstract string AnswerName(int number, string files);

    /// <summary>Title of an answer.</summary>
    public abstract string AnswerTitle(string files);

    /// <summary>Label of the slider of a part.</summary>
    public abstract string TravelOf(string part);

    /// <summary>Name of the travel's axis.</summary>
    public abstract string TravelAxis(string unit);

    /// <summary>Title of the plot of "what if".</summary>
    public abstract string WhatIfPlotTitle { get; }

    /// <summary>What the plot of "what if" shows.</summary>
    public abstract string WhatIfPlotCaption { get; }

    /// <summary>A job among others.</summary>
    public abstract string JobName(long number, string machine, string customer);

    /// <summary>Whether a flight that goes straight to its answer is kept.</summary>
    public abstract string KeepStraight(long job);

    /// <summary>Label of a check's outcome.</summary>
    public abstract string OutcomeOf(string check);

    /// <summary>Label of a check's number.</summary>
    public abstract string NumberOf(string check);

    /// <summary>Label of a check's note.</summary>
    public abstract string NoteOf(string check);

    /// <summary>A part that the hang check cannot show.</summary>
    public abstract string HangCheckCannotShow(string part);

    /// <summary>Title of a group of the rig form, by its table.</summary>
    public abstract string RigGroup(string table);

    /// <summary>Label of a field of the rig form; empty where the ground sheets have one.</summary>
    public abstract string RigField(string name);

    /// <summary>A word of the rig file.</summary>
    public abstract string RigWord(string word);

    /// <summary>What a number may be.</summary>
    public abstract string Range(double min, double max, string unit);

    /// <summary>A question of the complaint, by the type of its answers.</summary>
    public abstract string Question(string type);

    /// <summary>An answer of the complaint.</summary>
    public abstract string Choice(string type, string code);
}
