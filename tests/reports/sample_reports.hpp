#pragma once
// Reports with every kind of cell that a writer meets: values, absent values, cut-offs, text that needs care.

#include "reports/record/results.hpp"

namespace heraldgauge::test {

// Two swept points; a certified herald probability with a cut-off, an undefined visibility, an exact zero key rate.
reports::EncloseReport sample_enclose_report();
reports::QuickReport sample_quick_report();
reports::ListReport sample_list_report();
reports::CertificateReport sample_certificate_report();

}  // namespace heraldgauge::test
