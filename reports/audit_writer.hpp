#pragma once
// Writers of an audit: row by row, so that a table of any size takes little memory.

#include <functional>
#include <memory>
#include <string>
#include <string_view>

#include "reports/record/audit.hpp"
#include "reports/writer.hpp"

namespace heraldgauge::reports {

// Takes the text as it is made.
using TextSink = std::function<void(std::string_view)>;

class AuditWriter {
 public:
  virtual ~AuditWriter() = default;
  virtual void begin(const std::string& title) = 0;
  virtual void point(const AuditPoint& point) = 0;
  virtual void end(const AuditConclusion& conclusion) = 0;
};

// Text: what does not agree (the first twenty rows of it), the summary, the causes. JSON: everything, one point a line.
// CSV: one row a number; summary and causes are left to the other formats.
std::unique_ptr<AuditWriter> make_audit_writer(Format format, const TextLayout& layout, TextSink sink);

}  // namespace heraldgauge::reports
