#include "compare/status_text.hpp"

namespace heraldgauge::compare {

std::string status_text(fast::Status status) {
  switch (status) {
    case fast::Status::computed:
      return "computed";
    case fast::Status::undefined:
      return "undefined";
    case fast::Status::declined:
      break;
  }
  return "declined";
}

}  // namespace heraldgauge::compare
