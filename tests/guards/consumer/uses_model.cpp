#include "link.hpp"

int main() { return link().station_count() == 1 ? 0 : 1; }
