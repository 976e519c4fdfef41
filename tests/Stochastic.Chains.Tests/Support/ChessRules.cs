namespace Stochastic.Chains.Tests.Support;

/// <summary>A lone chess piece that makes a uniformly chosen legal move on the 8 x 8 board; state 8x + y for square (x, y).</summary>
internal static class ChessRules
{
    private const int Side = 8;
    private static readonly (int X, int Y)[] Straight = [(1, 0), (-1, 0), (0, 1), (0, -1)];
    private static readonly (int X, int Y)[] Diagonal = [(1, 1), (1, -1), (-1, 1), (-1, -1)];
    private static readonly (int X, int Y)[] Jumps = [(1, 2), (2, 1), (-1, 2), (-2, 1), (1, -2), (2, -1), (-1, -2), (-2, -1)];

    public static PublishedChain Walk(string piece)
    {
        var (directions, reach) = piece switch
        {
            "knight" => (Jumps, 1),
            "king" => ([.. Straight, .. Diagonal], 1),
            "rook" => (Straight, Side),
            "bishop" => (Diagonal, Side),
            "queen" => ([.. Straight, .. Diagonal], Side),
            _ => throw new InvalidOperationException($"No chess piece is known as '{piece}'."),
        };
        return PublishedChain.FromNeighbours([.. Enumerable.Range(0, Side * Side).Select(square => Moves(square, directions, reach))]);
    }

    private static int[] Moves(int square, (int X, int Y)[] directions, int reach) =>
    [
        .. from direction in directions
           from length in Enumerable.Range(1, reach)
           let x = (square / Side) + (length * direction.X)
           let y = (square % Side) + (length * direction.Y)
           where x is >= 0 and < Side && y is >= 0 and < Side
           select (Side * x) + y,
    ];
}
