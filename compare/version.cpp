namespace heraldgauge::compare {}
