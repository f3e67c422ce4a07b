#pragma once
// Writers: one record, several formats. A writer computes nothing and rounds nothing; what it returns depends on the
// record and the layout alone, never on the locale.

#include <optional>
#include <string>
#include <string_view>

#include "reports/record/results.hpp"

namespace heraldgauge::reports {

enum class Format { text, json, csv };

std::optional<Format> find_format(std::string_view name);

// How wide a text report may become: the columns of a terminal, or no limit where the output is piped or a file.
struct TextLayout {
  std::optional<int> columns;
};

// JSON is strict: absent is null, all rows have the same keys, results are strings. CSV follows RFC 4180, one row a
// point and quantity. Text is one aligned table, or stacked blocks where the table is wider than the terminal.
std::string write(const EncloseReport& report, Format format, const TextLayout& layout = {});
std::string write(const QuickReport& report, Format format, const TextLayout& layout = {});
std::string write(const ComparisonReport& report, Format format, const TextLayout& layout = {});
std::string write(const ListReport& report, Format format, const TextLayout& layout = {});

// The certificate file, JSON.
std::string write(const CertificateReport& report);

}  // namespace heraldgauge::reports
