// The registries of shortcuts and conventions, and the settings of their entries.

#include <algorithm>
#include <filesystem>

#include "tests/compare/departures_under_test.hpp"

namespace heraldgauge::compare {
namespace {

using model::Rational;

// The ids of a registry are the names of the files in the folder, so that none is left out and each is found at once.
void expect_one_file_each(const std::vector<Departure>& registry, DepartureKind kind, const std::string& folder) {
  std::vector<std::string> ids, files;
  for (const Departure& departure : registry) {
    EXPECT_EQ(departure.kind, kind) << departure.id;
    ids.push_back(departure.id);
  }
  for (const auto& entry : std::filesystem::directory_iterator(HERALDGAUGE_SOURCE_DIR "/compare/" + folder)) {
    files.push_back(entry.path().stem());
    std::replace(files.back().begin(), files.back().end(), '_', '-');
  }
  std::sort(files.begin(), files.end());
  EXPECT_EQ(ids, files);
}

TEST(Registry, HoldsTheFilesOfItsFolderInAlphabeticalOrder) {
  expect_one_file_each(shortcuts(), DepartureKind::shortcut, "shortcuts");
  expect_one_file_each(conventions(), DepartureKind::convention, "conventions");
}

TEST(Registry, HoldsWhatItMustAndEachIdOnce) {
  std::vector<std::string> ids;
  for (const auto* registry : {&shortcuts(), &conventions()}) {
    for (const Departure& departure : *registry) {
      EXPECT_TRUE(departure.evaluate) << departure.id;
      EXPECT_TRUE(departure.touches) << departure.id;
      EXPECT_FALSE(departure.sentence.empty() || departure.replaces.empty() || departure.claimed.empty() ||
                   departure.source.empty())
          << departure.id;
      EXPECT_TRUE(departure.enclose || departure.value_is_the_machine_number) << departure.id << " is never certified";
      ids.push_back(departure.id);
    }
  }
  std::sort(ids.begin(), ids.end());
  EXPECT_EQ(std::adjacent_find(ids.begin(), ids.end()), ids.end());
}

TEST(Settings, AreCheckedAgainstTheirRange) {
  const Departure& cutoff = departure_named("pair-cutoff");
  EXPECT_EQ(*checked_setting(cutoff, {}), Setting(Rational(3)));
  EXPECT_FALSE(checked_setting(cutoff, Rational(7, 2)));
  EXPECT_FALSE(checked_setting(cutoff, Rational(41)));
  EXPECT_FALSE(checked_setting(departure_named("linear-loss"), Rational(1)));
}

}  // namespace
}  // namespace heraldgauge::compare
