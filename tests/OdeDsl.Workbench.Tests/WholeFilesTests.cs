using OdeDsl.Workbench.Hosting;

namespace WorkbenchTests;

public class WholeFilesTests
{
    [Fact]
    public void Files_are_replaced_whole_and_no_temporary_file_is_left()
    {
        using Hosts.Folder folder = new();
        File.WriteAllText(Path.Combine(folder.Path, "a"), "old and longer than the new one");

        WholeFiles.Write(folder.Path, [("a", "new"), ("b", "second")]);

        Assert.Equal(["a", "b"], folder.Names);
        Assert.Equal("new", folder.Read("a"));
    }

    [Fact]
    public void If_one_file_cannot_be_written_none_is_replaced()
    {
        using Hosts.Folder folder = new();
        File.WriteAllText(Path.Combine(folder.Path, "a"), "old");

        Assert.ThrowsAny<IOException>(() => WholeFiles.Write(folder.Path, [("a", "new"), (Path.Combine("missing", "b"), "second")]));

        Assert.Equal(["a"], folder.Names);
        Assert.Equal("old", folder.Read("a"));
    }

    [Fact]
    public void Preparing_a_folder_leaves_nothing_in_it()
    {
        using Hosts.Folder folder = new();

        WholeFiles.Prepare(folder.Path);

        Assert.Empty(folder.Names);
    }
}
