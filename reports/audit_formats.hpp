#pragma once
// An audit as text for people, and as CSV and JSON: the writers behind make_audit_writer.

#include <memory>

#include "reports/audit_writer.hpp"

namespace heraldgauge::reports {

std::unique_ptr<AuditWriter> make_audit_text(const TextLayout& layout, TextSink sink);
std::unique_ptr<AuditWriter> make_audit_json(TextSink sink);
std::unique_ptr<AuditWriter> make_audit_csv(TextSink sink);

}  // namespace heraldgauge::reports
