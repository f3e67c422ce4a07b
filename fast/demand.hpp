#pragma once

namespace heraldgauge::fast {

// What a free pattern asks of a detector.
enum class Demand { anything, silent, clicks };

}  // namespace heraldgauge::fast
