using Stochastic.Chains.Benchmarks;

return args is [var name, .. var rest] && Commands.All.FirstOrDefault(command => command.Name == name) is { } command
    ? command.Run(rest)
    : Commands.Unknown(args);
