// Where answers go, and that a file is either whole or as it was.

#include <gtest/gtest.h>
#include <sys/stat.h>

#include <filesystem>

#include "tests/cli/program.hpp"

namespace heraldgauge::test {
namespace {

namespace fs = std::filesystem;

long files_in(const TemporaryFolder& folder) {
  return std::distance(fs::directory_iterator(folder.path()), fs::directory_iterator());
}

ProcessResult enclose_into(const std::string& file) {
  return heraldgauge({"enclose", "-", "--output", file}, small_scenario());
}

TEST(Output, ToAFileIsWhatStandardOutputGets) {
  const TemporaryFolder folder;
  const ProcessResult into_file = enclose_into(folder.file("answer"));
  EXPECT_EQ(into_file.status, 0);
  EXPECT_EQ(into_file.out, "");
  const std::string answer = contents_of(folder.file("answer"));
  EXPECT_EQ(answer, enclose_into("-").out);
  EXPECT_NE(answer.find("herald_probability"), std::string::npos);
  EXPECT_EQ(files_in(folder), 1);
}

TEST(Output, ReplacesARegularFileAndKeepsItsAccess) {
  const TemporaryFolder folder;
  write_file(folder.file("answer"), "old");
  chmod(folder.file("answer").c_str(), 0640);
  EXPECT_EQ(enclose_into(folder.file("answer")).status, 0);
  EXPECT_NE(contents_of(folder.file("answer")), "old");
  EXPECT_EQ(fs::status(folder.file("answer")).permissions(), fs::perms(0640));
}

TEST(Output, IsNotWrittenThroughALink) {
  const TemporaryFolder folder;
  write_file(folder.file("target"), "kept");
  fs::create_symlink(folder.file("target"), folder.file("link"));
  fs::create_symlink(folder.file("nowhere"), folder.file("dangling"));
  for (const char* name : {"link", "dangling"}) {
    const ProcessResult result = enclose_into(folder.file(name));
    EXPECT_EQ(result.status, 2);
    EXPECT_NE(result.err.find("symbolic link"), std::string::npos);
  }
  EXPECT_EQ(contents_of(folder.file("target")), "kept");
  EXPECT_FALSE(fs::exists(folder.file("nowhere")));
}

TEST(Output, IsNotWrittenToFoldersAndPipes) {
  const TemporaryFolder folder;
  mkfifo(folder.file("pipe").c_str(), 0600);
  EXPECT_EQ(enclose_into(folder.file("pipe")).status, 2);
  EXPECT_EQ(enclose_into(folder.path().string()).status, 2);
}

TEST(Output, DoesNotOverwriteTheScenario) {
  const TemporaryFolder folder;
  write_file(folder.file("link.toml"), small_scenario());
  EXPECT_EQ(heraldgauge({"enclose", folder.file("link.toml"), "--output", folder.file("link.toml")}).status, 2);
  EXPECT_EQ(contents_of(folder.file("link.toml")), small_scenario());
}

TEST(Output, LeavesAnOldFileAloneWhereTheInputIsAtFault) {
  const TemporaryFolder folder;
  write_file(folder.file("answer"), "old");
  EXPECT_EQ(heraldgauge({"enclose", "-", "--output", folder.file("answer")}, "nonsense").status, 2);
  EXPECT_EQ(contents_of(folder.file("answer")), "old");
}

TEST(Output, OfTwoDocumentsNeedsTwoPlaces) {
  const TemporaryFolder folder;
  EXPECT_EQ(heraldgauge({"enclose", "-", "--certificate", "-"}, small_scenario()).status, 2);
  const std::string file = folder.file("both");
  EXPECT_EQ(heraldgauge({"enclose", "-", "--certificate", file, "--output", file}, small_scenario()).status, 2);
  EXPECT_EQ(files_in(folder), 0);
}

TEST(Output, LeavesNothingBehindWhereTheDiskIsFull) {
  const TemporaryFolder folder;
  write_file(folder.file("link.toml"), small_scenario());
  // A file size limit of one block stands for a full disk.
  const ProcessResult result = shell(
      "trap '' XFSZ; ulimit -f 1; $PROGRAM enclose $FOLDER/link.toml --digits 5000 --output $FOLDER/answer", folder);
  EXPECT_EQ(result.status, 4) << result.err;
  EXPECT_EQ(files_in(folder), 1);
}

}  // namespace
}  // namespace heraldgauge::test
