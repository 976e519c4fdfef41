using Stochastic.Chains.ArchitectureTests.Sources;

namespace Stochastic.Chains.ArchitectureTests.Floors;

/// <summary>The check of floors is shown to find what it is there to find.</summary>
public class FloorCheckTests
{
    private const string Chain = "namespace Stochastic.Chains; public sealed class Chain { internal Chain Self => this; }";

    private const string Solve = """
        namespace Stochastic.Chains;
        public sealed class Shares { }
        public static class SolveExtensions { public static Shares Solve(this Chain chain) => new(); }
        """;

    [Fact]
    public void A_solve_may_use_the_model()
    {
        Violations(("Model/Chain.cs", Chain), ("Stationary/Solve.cs", Solve)).Should().BeEmpty();
    }

    [Fact]
    public void A_model_that_names_a_type_of_a_solve_is_found()
    {
        Violations(("Model/Chain.cs", Chain), ("Stationary/Solve.cs", Solve), ("Model/Bad.cs", "namespace Stochastic.Chains; class Bad { Shares? S; }"))
            .Should().Equal("Model/Bad.cs(1) names Stochastic.Chains.Shares of Stationary");
    }

    [Fact]
    public void A_model_that_calls_an_extension_method_of_a_solve_is_found_though_it_names_no_type()
    {
        Violations(("Model/Chain.cs", Chain), ("Stationary/Solve.cs", Solve), ("Model/Bad.cs", "namespace Stochastic.Chains; class Bad { object Ask(Chain chain) => chain.Solve(); }"))
            .Should().Equal("Model/Bad.cs(1) names Stochastic.Chains.SolveExtensions.Solve(Stochastic.Chains.Chain) of Stationary");
    }

    [Fact]
    public void A_solve_that_uses_a_sibling_is_found()
    {
        Violations(("Model/Chain.cs", Chain), ("Stationary/Solve.cs", Solve), ("Passage/Bad.cs", "namespace Stochastic.Chains; class Bad { object Ask(Chain chain) => chain.Solve(); }"))
            .Should().ContainSingle().Which.Should().StartWith("Passage/Bad.cs(1)");
    }

    [Fact]
    public void A_kernel_that_knows_chains_is_found_inside_a_generic_argument_and_a_base_list()
    {
        Violations(("Model/Chain.cs", Chain), ("Kernels/Bad.cs", "namespace Stochastic.Chains.Kernels; class Bad : List<Chain> { }"))
            .Should().ContainSingle().Which.Should().StartWith("Kernels/Bad.cs(1)");
    }

    [Fact]
    public void A_comment_or_a_string_is_no_use()
    {
        Violations(("Model/Chain.cs", Chain), ("Kernels/Good.cs", "namespace Stochastic.Chains.Kernels; /* Chain */ class Good { string S = \"Chain\"; /// <see cref=\"Chain\"/>\n }"))
            .Should().BeEmpty();
    }

    [Fact]
    public void A_partial_type_may_be_used_through_its_lower_part_and_not_through_its_upper_one()
    {
        const string Lower = "namespace Stochastic.Chains; public static partial class Maker { public static int Low() => 1; }";
        const string Upper = "namespace Stochastic.Chains; public static partial class Maker { public static int High() => 2; }";
        const string User = "namespace Stochastic.Chains; class User { int A => Maker.Low(); int B => Maker.High(); }";

        Violations(("Model/Maker.cs", Lower), ("Stationary/Maker.cs", Upper), ("Model/User.cs", User))
            .Should().Equal("Model/User.cs(1) names Stochastic.Chains.Maker.High() of Stationary");
    }

    private static IEnumerable<string> Violations(params (string Path, string Text)[] files) =>
        FloorReference.In(LibrarySource.Compile(files)).Where(reference => !reference.IsAllowed).Select(reference => reference.ToString());
}
