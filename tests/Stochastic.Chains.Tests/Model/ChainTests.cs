using Stochastic.Chains.Tests.Support;

namespace Stochastic.Chains.Tests.Model;

public class ChainTests
{
    private static readonly Chain<string> Pump = Chain.Build<string>(rows => rows
        .Row("new", ("new", 0.90), ("worn", 0.10))
        .Row("worn", ("worn", 0.75), ("failed", 0.25))
        .Row("failed", ("new", 1.0)));

    [Fact]
    public void A_row_is_the_distribution_of_the_next_state()
    {
        var next = Pump.Row("worn");

        next["worn"].Should().Be(0.75);
        next["failed"].Should().Be(0.25);
        next["new"].Should().Be(0);
        next.States.Should().BeSameAs(Pump.States);
    }

    [Fact]
    public void Transitions_come_row_by_row_in_state_order()
    {
        Pump.Transitions.Should().Equal(
            new("new", "new", 0.90),
            new("new", "worn", 0.10),
            new("worn", "worn", 0.75),
            new("worn", "failed", 0.25),
            new Transition<string>("failed", "new", 1.0));
        Pump.TransitionsFrom("worn").Should().Equal(new("worn", "worn", 0.75), new Transition<string>("worn", "failed", 0.25));
    }

    [Fact]
    public void Arrays_and_matrices_make_the_same_chain_again()
    {
        var random = new Random(11);
        foreach (var states in new[] { 1, 2, 3, 63, 64, 65, 128, 129 })
        {
            var moves = Enumerable.Range(0, states)
                .SelectMany(from => Enumerable.Range(0, states).OrderBy(_ => random.Next()).Take(4).ToList() is var targets
                    ? targets.Select(to => new Transition<int>(from, to, 1.0 / targets.Count))
                    : []);
            var chain = Chain.FromTransitions(Enumerable.Range(0, states), moves);

            Chain.FromMatrix(chain.ToArray()).Transitions.Should().Equal(chain.Transitions);
            Chain.FromMatrix(chain.ToMatrix()).Transitions.Should().Equal(chain.Transitions);
            Chain.FromTransitions(chain.States, chain.Transitions).Transitions.Should().Equal(chain.Transitions);
            chain.ToMatrix().Storage.IsDense.Should().Be(chain.Storage == MatrixStorage.Dense);
        }
    }

    [Fact]
    public void Copies_are_not_shared_with_the_chain()
    {
        var array = Pump.ToArray();
        var matrix = Pump.ToMatrix();

        array[0, 1] = 7;
        matrix[0, 1] = 7;

        Pump["new", "worn"].Should().Be(0.10);
        Pump.ToArray().Should().NotBeSameAs(Pump.ToArray());
    }

    [Fact]
    public void An_unknown_state_is_refused_with_the_states_there_are()
    {
        var questions = new Action[]
        {
            () => _ = Pump["wron", "new"],
            () => _ = Pump["new", "wron"],
            () => Pump.Row("wron"),
            () => Pump.TransitionsFrom("wron"),
        };

        foreach (var question in questions)
        {
            var refusal = question.Should().Throw<UnknownStateException>().Which;
            refusal.State.Should().Be("wron");
            refusal.Message.Should().Be("'wron' is not one of the chain's 3 states: 'new', 'worn', 'failed'. Correct the label.");
            refusal.Should().BeAssignableTo<KeyNotFoundException>();
        }
    }

    [Fact]
    public void A_null_state_is_unknown()
    {
        FluentActions.Invoking(() => Pump[null!, "new"]).Should().Throw<UnknownStateException>().Which.State.Should().Be("null");
    }

    [Fact]
    public void The_text_of_a_small_chain_is_a_table()
    {
        Pump.ToString().Split(Environment.NewLine).Should().Equal(
            "Chain of 3 states, 5 transitions",
            "from \\ to  new  worn  failed",
            "new        0.9   0.1       ·",
            "worn         ·  0.75    0.25",
            "failed       1     ·       ·");
    }

    [Fact]
    public void The_text_of_a_large_chain_is_one_line()
    {
        Identity(12).ToString().Split(Environment.NewLine).Should().HaveCount(14);
        Identity(13).ToString().Should().Be("Chain of 13 states, 13 transitions: '0', '1', '2', '3', '4', '5', '6', '7' and 5 more");
    }

    [Fact]
    public void The_text_is_the_same_in_every_culture()
    {
        var before = Pump.ToString();
        using var culture = new CommaCulture();

        Pump.ToString().Should().Be(before);
    }

    [Fact]
    public void A_derived_fact_is_computed_once_and_kept()
    {
        var chain = Identity(3);
        var runs = 0;

        var facts = Enumerable.Range(0, 5).Select(_ => chain.Derive(_ => $"fact {Interlocked.Increment(ref runs)}")).ToList();

        facts.Should().OnlyContain(fact => fact == "fact 1");
        Identity(3).Derive(_ => "another chain").Should().Be("another chain");
    }

    private static Chain<int> Identity(int states) => Chain.FromTransitions(Enumerable.Range(0, states).Select(k => new Transition<int>(k, k, 1)));
}
