#include <compare/list_command.hpp>

int main() {
  using namespace heraldgauge::compare;
  return list_command(ListSubject::quantities).entries.empty() ? 1 : 0;
}
