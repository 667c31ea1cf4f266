#include "io/write/file.hpp"

#include <gtest/gtest.h>
#include <signal.h>
#include <sys/resource.h>
#include <unistd.h>

#include <fstream>
#include <sstream>

#include "io/write/provenance.hpp"
#include "tests/io/scratch.hpp"

namespace raiser::io {
namespace {

namespace fs = std::filesystem;

class Files : public testing::Test {
 protected:
  static std::string content(const fs::path& file) {
    std::ifstream input(file, std::ios::binary);
    std::ostringstream text;
    text << input.rdbuf();
    return text.str();
  }
  std::size_t entries() const {
    return static_cast<std::size_t>(std::distance(fs::directory_iterator(folder), fs::directory_iterator()));
  }
  // What a call throws, or an empty text.
  template <class Call>
  static std::string fault(Call call) {
    try {
      call();
    } catch (const WriteError& error) {
      return error.what();
    }
    return "";
  }

  test::ScratchFolder scratch;
  const fs::path& folder = scratch.path();
};

// While it lives, no file may grow beyond a few bytes: stands for a full disk.
class FullDisk {
 public:
  FullDisk() {
    ::getrlimit(RLIMIT_FSIZE, &before_);
    old_ = ::signal(SIGXFSZ, SIG_IGN);
    const rlimit tight{16, before_.rlim_max};
    ::setrlimit(RLIMIT_FSIZE, &tight);
  }
  ~FullDisk() {
    ::setrlimit(RLIMIT_FSIZE, &before_);
    ::signal(SIGXFSZ, old_);
  }

 private:
  rlimit before_{};
  sighandler_t old_ = SIG_DFL;
};

TEST_F(Files, ReplaceWhatWasThereWhole) {
  write_file(folder / "a.txt", "first, and longer");
  write_file(folder / "a.txt", std::string_view("sec\0nd", 6));
  EXPECT_EQ(content(folder / "a.txt"), std::string("sec\0nd", 6));
  EXPECT_EQ(entries(), 1U);
}

TEST_F(Files, KeepTheOldContentWhenTheDiskIsFull) {
  write_file(folder / "a.txt", "old");
  std::string message;
  {
    const FullDisk full;
    message = fault([&] { write_file(folder / "a.txt", std::string(5000, 'x')); });
  }
  EXPECT_NE(message.find("a.txt"), std::string::npos) << message;
  EXPECT_NE(message.find("make room"), std::string::npos) << message;
  EXPECT_EQ(content(folder / "a.txt"), "old");
  EXPECT_EQ(entries(), 1U) << "a temporary file is left behind";
}

TEST_F(Files, SayWhichFolderIsMissing) {
  const std::string message = fault([&] { write_file(folder / "nowhere" / "a.txt", "x"); });
  EXPECT_NE(message.find("nowhere"), std::string::npos) << message;
  EXPECT_NE(message.find("check the path"), std::string::npos) << message;
}

TEST_F(Files, AppearTogether) {
  Staging staging(folder / "made" / "on the way");
  staging.add("a.txt", "a");
  staging.add("b.txt", "b");
  EXPECT_FALSE(fs::exists(folder / "made" / "on the way" / "a.txt"));
  const auto published = staging.publish();
  ASSERT_EQ(published.size(), 2U);
  EXPECT_EQ(content(published[0]), "a");
  EXPECT_EQ(content(folder / "made" / "on the way" / "b.txt"), "b");
}

TEST_F(Files, AppearNotAtAllWhenOneFails) {
  std::string message;
  {
    Staging staging(folder);
    staging.add("a.txt", "a");
    const FullDisk full;
    message = fault([&] { staging.add("b.txt", std::string(5000, 'x')); });
  }
  EXPECT_FALSE(message.empty());
  EXPECT_EQ(message.find(".raiser-"), std::string::npos) << "names the hidden folder: " << message;
  EXPECT_EQ(entries(), 0U);
}

TEST_F(Files, LeaveNoFolderThatWasMadeInVain) {
  const fs::path made = folder / "made";
  { Staging staging(made / "on the way"); }
  EXPECT_FALSE(fs::exists(made));
  fs::create_directory(made);
  { Staging staging(made / "on the way"); }
  EXPECT_TRUE(fs::exists(made)) << "was there before";
  EXPECT_FALSE(fs::exists(made / "on the way"));
  EXPECT_NE(fault([&] { Staging staging(made / "a" / std::string(300, 'x')); }), "");
  EXPECT_FALSE(fs::exists(made / "a")) << "made before the one that cannot be";
}

TEST_F(Files, AppearNotAtAllWhenAFolderIsInTheWay) {
  fs::create_directory(folder / "b.txt");
  {
    Staging staging(folder);
    staging.add("a.txt", "a");
    staging.add("b.txt", "b");
    EXPECT_NE(fault([&] { staging.publish(); }).find("b.txt"), std::string::npos);
  }
  EXPECT_FALSE(fs::exists(folder / "a.txt"));
  EXPECT_EQ(entries(), 1U);
}

TEST_F(Files, NeedAFolderWhereTheyGo) {
  write_file(folder / "file", "x");
  EXPECT_NE(fault([&] { Staging staging(folder / "file"); }).find("file"), std::string::npos);
  EXPECT_NE(fault([] { Staging staging("/proc/raiser"); }).find("cannot write /proc/raiser"),
            std::string::npos);
}

// The examples of FIPS PUB 180-4's predecessor FIPS 180-2, Appendix B, and the
// empty message; the last as `sha256sum` prints it.
TEST(Sha256, MatchesThePublishedExamples) {
  EXPECT_EQ(sha256("abc"), "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad");
  EXPECT_EQ(sha256("abcdbcdecdefdefgefghfghighijhijkijkljklmklmnlmnomnopnopq"),
            "248d6a61d20638b8e5c026930c3e6039a33ce45964ff2167f6ecedd419db06c1");
  EXPECT_EQ(sha256(std::string(1000000, 'a')),
            "cdc76e5c9914fb9281a1c7e284d73e67f1809a48a497200e046d39ccc7112cd0");
  EXPECT_EQ(sha256(""), "e3b0c44298fc1c149afbf4c8996fb92427ae41e4649b934ca495991b7852b855");
}

// Around the ends of blocks, as `printf 'a%.0s' $(seq N) | sha256sum` prints it.
TEST(Sha256, PadsAroundTheEndOfABlock) {
  EXPECT_EQ(sha256(std::string(55, 'a')), "9f4390f8d30c2dd92ec9f095b65e2b9ae9b0a925a5258e241c9f1e910f734318");
  EXPECT_EQ(sha256(std::string(56, 'a')), "b35439a4ac6f0948b6d6f9e3c6af0f5f590ce20f1bde7090ef7970686ec6738a");
  EXPECT_EQ(sha256(std::string(63, 'a')), "7d3e74a05d7db15bce4ad9ec0658ea98e3f06eeecf16b4c6fff2da457ddc2f34");
  EXPECT_EQ(sha256(std::string(64, 'a')), "ffe054fe7ae0cb6dc65c3af9b61d5209f439851db43d0ba5997337df154668eb");
}

}  // namespace
}  // namespace raiser::io
