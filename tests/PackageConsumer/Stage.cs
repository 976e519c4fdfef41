namespace PackageConsumer;

/// <summary>The life of an invented pump.</summary>
internal enum Stage
{
    New,
    Worn,
    Failed,
}
