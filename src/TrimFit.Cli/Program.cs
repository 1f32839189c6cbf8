using TrimFit.Cli;

return TrimFitProgram.Run(args);
