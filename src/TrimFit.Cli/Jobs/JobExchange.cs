using TrimFit.Core.Workshop;
using TrimFit.Jobs;
using TrimFit.Reporting.Jobs;

namespace TrimFit.Cli;

/// <summary>Verbs that carry jobs out of and into a book, or out for good.</summary>
internal static class JobExchange
{
    public static int Export(JobChoices choices, long number, string path, TextWriter output)
    {
        using JobBook book = choices.Open(BookAccess.Read);
        using var zip = new MemoryStream();
        JobZip.Write(book.Bundle(number), zip);
        OutputFiles.Write("--out", path, zip.ToArray());
        output.Write(JobReportText.Exported(number, Path.GetFileName(path), zip.Length, choices.Common.Style));
        return ExitCode.Done;
    }

    public static int Import(JobChoices choices, string path, long mostBytes, TextWriter output)
    {
        JobBundle bundle;
        using (FileStream zip = InputFiles.Open(path))
            bundle = JobZip.Read(Path.GetFileName(path), zip, mostBytes);
        using JobBook book = choices.Open(BookAccess.Create);
        JobRecord job = book.Import(bundle);
        output.Write(JobReportText.Imported(job.Number, bundle.Job.Number, choices.Common.Style));
        return ExitCode.Done;
    }

    public static int Delete(JobChoices choices, long number, bool yes, TextWriter output)
    {
        using JobBook book = choices.Open(BookAccess.Write);
        if (!yes)
            throw new CommandLineException(JobReportText.AskDelete(book.Job(number), choices.Common.Style));
        DeletedJob gone = book.Delete(number);
        output.Write(JobReportText.Deleted(number, gone.Flights, gone.Contents, gone.RoomGivenBack, choices.Common.Style));
        return ExitCode.Done;
    }
}
