#include "tests/support/mutation.hpp"

#include <vector>

namespace heraldgauge::test {
namespace {

const std::vector<std::string> awkward = {"nan",
                                          "-inf",
                                          "inf",
                                          "1e999999999",
                                          "1e-9999",
                                          "-1",
                                          "-0.0",
                                          "0x1F",
                                          "1_000",
                                          "1,5",
                                          "3/0",
                                          "7/3",
                                          "\"",
                                          "'",
                                          "\"\"\"",
                                          "\\u0000",
                                          "\\",
                                          "[",
                                          "]",
                                          "[[",
                                          "{",
                                          "}",
                                          ",",
                                          ";",
                                          "=",
                                          ".",
                                          "#",
                                          "\r",
                                          "\n",
                                          "\t",
                                          "\r\n",
                                          "null",
                                          "true",
                                          "[]",
                                          "{}",
                                          "\xef\xbb\xbf",
                                          "\xff",
                                          "\xc3",
                                          "\xed\xa0\x80",
                                          "psi-",
                                          "either",
                                          "1e",
                                          "--5",
                                          "10000",
                                          "0.5e",
                                          std::string(1, '\0'),
                                          std::string(300, '9'),
                                          std::string(300, '[')};

// Exchanges a digit, so that the text may still be well-formed.
void change_digit(Random& random, std::string& text, std::size_t from) {
  const std::size_t digit = text.find_first_of("0123456789", from);
  if (digit != std::string::npos) text[digit] = static_cast<char>('0' + random() % 10);
}

void change_once(Random& random, std::string& text) {
  const std::size_t place = random() % (text.size() + 1), length = random() % 12;
  switch (random() % 10) {
    case 0:
      if (place < text.size()) text[place] = static_cast<char>(random() % 256);
      break;
    case 1:
      text.erase(place, length);
      break;
    case 2:
      text.insert(random() % (text.size() + 1), text.substr(place, length));
      break;
    case 3:
      text.resize(place);
      break;
    case 4:
    case 5:
      text.insert(place, awkward[random() % awkward.size()]);
      break;
    default:
      change_digit(random, text, place);
  }
}

}  // namespace

std::string mutated(Random& random, std::string text) {
  for (std::size_t left = 1 + random() % 3; left > 0; --left) change_once(random, text);
  return text;
}

}  // namespace heraldgauge::test
