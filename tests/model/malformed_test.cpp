// Malformed scenarios: text after a good start -> how the first fault begins.
#include <gtest/gtest.h>

#include "tests/model/scenario_support.hpp"

namespace heraldgauge::model {
namespace {

struct Case {
  std::string text;
  std::string fault;
};

// Line 6 is the first after the base text.
const std::vector<Case> after_base = {
    {"a", "x.toml:6:"},
    {"a =", "x.toml:6:"},
    {"= 1", "x.toml:6:"},
    {"[a", "x.toml:6:"},
    {"[[a]", "x.toml:6:"},
    {"[]", "x.toml:6:"},
    {"title = \"x", "x.toml:6:"},
    {"title = 'x\n'", "x.toml:6:"},
    {"title = \"\\q\"", "x.toml:6:"},
    {"title = x", "x.toml:6:"},
    {"title = 1 2", "x.toml:6:"},
    {"title = [1, 2", "x.toml:6:"},
    {"title = {a = 1", "x.toml:6:"},
    {"title = 01", "x.toml:6:"},
    {"title = .5", "x.toml:6:"},
    {"title = 5.", "x.toml:6:"},
    {"title = 1,5", "x.toml:6:"},
    {"title = 99999999999999999999", "x.toml:6:"},
    {"title = 1__0", "x.toml:6:"},
    {"title = 1e999", "x.toml:6:"},
    {"title = +-1", "x.toml:6:"},
    {"chain.stations = 2", "x.toml:6:"},
    {"title = \"a\"\ntitle = \"b\"", "x.toml:7:"},
    {"[chain]\nstations = 2", "x.toml:6:"},
    {"a = 1\r", "x.toml:6:6: a carriage return"},
    {"\xff", "x.toml:6:1: byte 0xff is not UTF-8"},
    {"# \xc3\x28", "x.toml:6:3: byte 0xc3"},
    {"# \xc0\x80", "x.toml:6:3: byte 0xc0"},
    {"# \xed\xa0\x80", "x.toml:6:3: byte 0xed"},
    {"# \xf4\x90\x80\x80", "x.toml:6:3: byte 0xf4"},
    {"# \xe4\xb8", "x.toml:6:3: byte 0xe4"},
    {"\xc3\xa9 = 1", "x.toml:6:1: a character beyond ASCII"},
    {"a\xc2\xa0= 1", "x.toml:6:2: a character beyond ASCII"},
    {"# \xc3\xa9 \x01", "x.toml:6:5: control character 0x01"},
    {"title = \"\x1f\"", "x.toml:6:10: control character"},
    {"# \x7f", "x.toml:6:3: control character 0x7f"},
    {std::string("# \0", 3), "x.toml:6:3: control character 0x00"},
    {"a = " + std::string(65, '['), "x.toml:6:69: brackets are nested"},
    {"a" + std::string(64, '.') + " = 1", "x.toml:6:65: a key has too many parts"},
    {"foo = 1", "x.toml:6:1: foo: is an unknown key"},
    {"foo.bar = 1", "x.toml:6:5: foo.bar: is an unknown key"},
    {"[foo]", "x.toml:6:2: foo: is an unknown"},
    {"link.kind = 'x'", "x.toml:6:6: link.kind: is an unknown"},
    {"source.K.pair_parameter = 1", "x.toml:6:10: source.K.pair_parameter: is an unknown"},
    {"source.1.pair_parameter = 0.1", "x.toml:6:10: source.1.pair_parameter: is an address outside"},
    {"[override]\nsource.pair_parameter = 0.1", "x.toml:7:8: source.pair_parameter: names no single place"},
    {"[override]\nsource.01.pair_parameter = 0.1", "x.toml:7:11: source.01.pair_parameter: is an unknown"},
    {"[override]\nsource.4.pair_parameter = 0.1",
     "x.toml:7:27: source.4.pair_parameter: there is no source 4; allowed: source 0 to 3"},
    {"[override]\nstation.0.herald = 'psi-'", "x.toml:7:20: station.0.herald: there is no station 0"},
    {"[override]\nstation.9999999999.herald = 'psi-'", "x.toml:7:20: station.9999999999.herald: is an unknown"},
    {"[override]\narm.0.left.rotation_deg = 5", "x.toml:7:12: arm.0.left.rotation_deg: is an unknown"},
    {"[override]\n'source.1.pair_parameter' = 0.1\nsource.1.pair_parameter = 0.1", "x.toml:"},
    {"[override]\nsource.1 = {pair_parameter = 0.1, squeezing = 0.1}",
     "x.toml:7:47: source.1.squeezing: stands beside"},
    {"override = 3", "x.toml:6:1: override: is a number"},
    {"sweep = 3", "x.toml:6:1: sweep: is no array"},
    {"source.squeezing = 0.1", "x.toml:6:20: source.squeezing: stands beside source.pair_parameter"},
    {"source.pair_probability = 0.1", "x.toml:6:27: source.pair_probability: does not belong"},
    {"channel.length_km = 1", "x.toml:6:21: channel.length_km: stands beside channel.transmittance"},
    {"channel.insertion_loss_db = 1", "x.toml:6:29: channel.insertion_loss_db: stands beside"},
    {"title = 3", "x.toml:6:9: title: is a number; allowed: a text"},
    {"title = true", "x.toml:6:9: title: is a truth value"},
    {"title = 1979-05-27", "x.toml:6:9: title: is a date or time"},
    {"title = {}", "x.toml:6:9: title: is a table"},
    {"analyser.left_deg = nan", "x.toml:6:21: analyser.left_deg: 'nan' is not a number"},
    {"analyser.left_deg = -inf", "x.toml:6:21: analyser.left_deg: '-inf' is not finite"},
    {"analyser.left_deg = 0x1F", "x.toml:6:21: analyser.left_deg: '0x1F' is hexadecimal"},
    {"analyser.left_deg = 0o17", "x.toml:6:21: analyser.left_deg: '0o17' is octal"},
    {"analyser.left_deg = 0b11", "x.toml:6:21: analyser.left_deg: '0b11' is binary"},
    {"analyser.left_deg = '1,5'", "x.toml:6:21: analyser.left_deg: '1,5' has a comma"},
    {"analyser.left_deg = '1/0'", "x.toml:6:21: analyser.left_deg: '1/0' has a denominator of zero"},
    {"analyser.left_deg = '1e10001'", "x.toml:6:21: analyser.left_deg: '1e10001' has an exponent"},
    {"analyser.left_deg = true", "x.toml:6:21: analyser.left_deg: is a truth value"},
    {"analyser = { left_deg = 1, right_deg = '\xc3\xa9' }", "x.toml:6:40: analyser.right_deg: "},
    {"\"title\" = '\xc3\xa9'\nanalyser.left_deg = 'x'", "x.toml:7:21: analyser.left_deg"},
    {"analyser = {\"left_deg\" = 1, \"\xc3\xa9\xc3\xa9\" = 2, \"right_deg\" = nan}",
     "x.toml:6:29: analyser.\xc3\xa9\xc3\xa9: is an unknown"},
    {"chain.herald = 'phi+'", "x.toml:6:16: chain.herald: is \"phi+\"; allowed: \"psi+\", \"psi-\" or \"either\""},
    {"chain.herald = ['psi+']", "x.toml:6:16: chain.herald: holds 1 outcomes for 3 stations"},
    {"inputs = 'double'", "x.toml:6:10: inputs: is \"double\""},
    {"station.detector.dark_slope = 3", "x.toml: station.detector.dark_scale: is missing"},
    {"end.detector = {dark_probability = 0, dark_scale = 1}", "x.toml:6:"},
    {"end.detector.dark_probability = 0\nend.detector.dark_scale = 0\nend.detector.dark_slope = 0",
     "x.toml:7:27: end.detector.dark_scale: stands beside"},
    {"ask.quantities = ['gian']", "x.toml:6:19: ask.quantities: \"gian\" is an unknown quantity"},
    {"ask.quantities = ['gain', 'gain']", "x.toml:6:27: ask.quantities: \"gain\" is asked twice"},
    {"ask.quantities = [3]", "x.toml:6:19: ask.quantities: holds a number"},
    {"ask.quantities = 3", "x.toml:6:18: ask.quantities: is a number"},
    {"ask.quantities = ['pattern_probability']", "x.toml:6:18: ask.quantities: asks pattern_probability without"},
    {"ask.pattern = 3", "x.toml:6:15: ask.pattern: is a number"},
    {"ask.pattern = {middle = '1'}", "x.toml:6:25: ask.pattern: holds the unknown part middle"},
    {"ask.pattern = {left = '1'}", "x.toml:6:23: ask.pattern: names 1 of 2 detectors"},
    {"ask.pattern = {left = '12'}", "x.toml:6:23: ask.pattern: holds \"2\""},
    {"ask.pattern = {stations = ['1100']}", "x.toml:6:27: ask.pattern: names 1 of 3 stations"},
    {"ask.pattern = {stations = '1100'}", "x.toml:6:27: ask.pattern: stations is a text"},
    {"ask.pattern = {left = ['n1', '0']}", "x.toml:6:15: ask.pattern: counts photons at a threshold"},
    {"ask.pattern = ['1']", "x.toml:6:15: ask.pattern: names 1 of 16 detectors"},
    {"ask.pattern = {left = ['n9999999', '0']}", "x.toml:6:23: ask.pattern: holds \"n9999999\""},
};

const std::vector<Case> after_sweep = {
    {"", "x.toml:6:1: sweep.key: is missing"},
    {"key = 3", "x.toml:7:7: sweep.key: is a number"},
    {"key = 'foo'", "x.toml:7:7: foo: is an unknown key"},
    {"key = 'title'\nvalues = ['a']", "x.toml:7:7: sweep.key: \"title\" is no parameter"},
    {"key = 'end.detector.efficiency'", "x.toml:6:1: sweep.from: is missing"},
    {"key = 'end.detector.efficiency'\nvalues = []", "x.toml:8:10: sweep.values: is empty"},
    {"key = 'end.detector.efficiency'\nvalues = 3", "x.toml:8:10: sweep.values: is a number"},
    {"key = 'end.detector.efficiency'\nvalues = [0.1, 1.5, 2]", "x.toml:8:16: end.detector.efficiency: is 1.5"},
    {"key = 'end.detector.efficiency'\nvalues = [0.1]\nfrom = 0", "x.toml:9:8: sweep.from: stands beside values"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 2\npoints = 3", "x.toml:9:6: sweep.to: is 2"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 1", "x.toml:10:10: sweep.points: is 1"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 10000001", "x.toml:10:10: sweep.points: is 10000001"},
    {"key = 'end.detector.efficiency'\nfrom = 1\nto = 1\npoints = 2", "x.toml:9:6: sweep.to: equals from"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 2\nspacing = 'log'",
     "x.toml:11:11: sweep.spacing: needs ends above 0"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 2\nspacing = 'cubic'",
     "x.toml:11:11: sweep.spacing: is an unknown word"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 2\nstep = 1",
     "x.toml:11:1: sweep.step: is an unknown key"},
    {"key = 'chain.stations'\nfrom = 1\nto = 4\npoints = 3", "x.toml:10:10: sweep.points: gives 2.5, no integer"},
    {"key = 'chain.herald'\nfrom = 1\nto = 4\npoints = 3", "x.toml:6:1: sweep.values: is missing"},
    {"key = 'station.4.herald'\nvalues = ['psi-']", "x.toml: station.4.herald: there is no station 4"},
    {"key = 'end.detector.efficiency'\nvalues = [1]\n[[sweep]]\nkey = 'end.detector.efficiency'\nvalues = [1]",
     "x.toml:9:1: end.detector.efficiency: is swept twice"},
    {"key = 'end.detector.efficiency'\nfrom = 0\nto = 1\npoints = 4000\n[[sweep]]\nkey = 'channel.transmittance'\nfrom "
     "= 0\nto = 1\npoints = 4000",
     "x.toml:11:1: channel.transmittance: makes the sweeps more than"},
};

TEST(Malformed, TheFirstFaultHasItsPlaceAndReason) {
  ASSERT_GE(after_base.size() + after_sweep.size(), 80u);
  for (const Case& one : after_base)
    EXPECT_EQ(first_fault(base_text + one.text).substr(0, one.fault.size()), one.fault) << one.text;
  for (const Case& one : after_sweep) {
    EXPECT_EQ(first_fault(base_text + "[[sweep]]\n" + one.text).substr(0, one.fault.size()), one.fault) << one.text;
  }
}

TEST(Malformed, OtherEncodingsAreNamed) {
  EXPECT_NE(first_fault("\xff\xfe"
                        "a")
                .find("UTF-16"),
            std::string::npos);
  EXPECT_NE(first_fault(std::string(10'000'001, ' ')).find("10000001 bytes"), std::string::npos);
}

TEST(Malformed, ByteOrderMarkAndWindowsLineEndsAreFine) {
  std::string windows = "\xef\xbb\xbf";
  for (const char c : base_text) windows += c == '\n' ? "\r\n" : std::string(1, c);
  EXPECT_EQ(first_fault(windows), "no fault");
}

}  // namespace
}  // namespace heraldgauge::model
