#pragma once
// Text that waits on disk until it is known whether it may be shown: an answer of any size comes out whole or not at
// all.

#include <cstdio>
#include <memory>
#include <string>
#include <string_view>

namespace heraldgauge::cli {

class Spool {
 public:
  // Uses a file without a name in the folder for temporary files.
  Spool();

  void write(std::string_view text);
  // Writes all that was spooled as write_output does. What went wrong where the machine failed, empty where it is
  // written.
  std::string deliver(const std::string& name);

 private:
  struct Close {
    void operator()(std::FILE* file) const { std::fclose(file); }
  };
  std::unique_ptr<std::FILE, Close> file_;
  bool failed_ = false;
};

}  // namespace heraldgauge::cli
