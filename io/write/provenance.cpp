#include "io/write/provenance.hpp"

#include <fmt/format.h>

#include <array>
#include <bit>
#include <cmath>
#include <cstdint>
#include <fstream>
#include <sstream>

namespace raiser::io {
namespace {

using State = std::array<std::uint32_t, 8>;

bool is_prime(std::uint32_t n) {
  for (std::uint32_t d = 2; d * d <= n; ++d) {
    if (n % d == 0) return false;
  }
  return true;
}

// The first N primes: FIPS 180-4 takes its constants from their roots.
template <std::size_t N>
std::array<std::uint32_t, N> primes() {
  std::array<std::uint32_t, N> found{};
  std::uint32_t n = 2;
  for (std::uint32_t& prime : found) {
    while (!is_prime(n)) ++n;
    prime = n++;
  }
  return found;
}

// The first 32 bits of the fractional part of x. Roots of the primes below
// 312 are below 18, so that a double keeps 47 bits of the fraction.
std::uint32_t fraction_bits(double x) {
  return static_cast<std::uint32_t>((x - std::floor(x)) * 4294967296.0);
}

std::array<std::uint32_t, 64> round_constants() {
  std::array<std::uint32_t, 64> constants = primes<64>();
  for (std::uint32_t& c : constants) c = fraction_bits(std::cbrt(static_cast<double>(c)));
  return constants;
}

State initial_state() {
  State state = primes<8>();
  for (std::uint32_t& h : state) h = fraction_bits(std::sqrt(static_cast<double>(h)));
  return state;
}

std::array<std::uint32_t, 64> schedule(std::string_view block) {
  std::array<std::uint32_t, 64> w{};
  for (std::size_t t = 0; t < 16; ++t) {
    for (std::size_t i = 0; i < 4; ++i) w[t] = (w[t] << 8U) | static_cast<unsigned char>(block[4 * t + i]);
  }
  for (std::size_t t = 16; t < 64; ++t) {
    const std::uint32_t a = w[t - 15], b = w[t - 2];
    const std::uint32_t small0 = std::rotr(a, 7) ^ std::rotr(a, 18) ^ (a >> 3U);
    const std::uint32_t small1 = std::rotr(b, 17) ^ std::rotr(b, 19) ^ (b >> 10U);
    w[t] = small1 + w[t - 7] + small0 + w[t - 16];
  }
  return w;
}

void absorb(State& state, std::string_view block, const std::array<std::uint32_t, 64>& constants) {
  const auto w = schedule(block);
  auto [a, b, c, d, e, f, g, h] = state;
  for (std::size_t t = 0; t < 64; ++t) {
    const std::uint32_t big1 = std::rotr(e, 6) ^ std::rotr(e, 11) ^ std::rotr(e, 25);
    const std::uint32_t first = h + big1 + ((e & f) ^ (~e & g)) + constants[t] + w[t];
    const std::uint32_t big0 = std::rotr(a, 2) ^ std::rotr(a, 13) ^ std::rotr(a, 22);
    const std::uint32_t second = big0 + ((a & b) ^ (a & c) ^ (b & c));
    h = g, g = f, f = e, e = d + first;
    d = c, c = b, b = a, a = first + second;
  }
  const State change{a, b, c, d, e, f, g, h};
  for (std::size_t i = 0; i < 8; ++i) state[i] += change[i];
}

}  // namespace

std::string sha256(std::string_view bytes) {
  const auto constants = round_constants();
  State state = initial_state();
  std::string tail(bytes.substr(bytes.size() / 64 * 64));
  for (std::size_t i = 0; i + 64 <= bytes.size(); i += 64) absorb(state, bytes.substr(i, 64), constants);
  tail.push_back(static_cast<char>(0x80));
  tail.resize(tail.size() <= 56 ? 56 : 120, '\0');
  const std::uint64_t bits = static_cast<std::uint64_t>(bytes.size()) * 8;
  for (int shift = 56; shift >= 0; shift -= 8) tail.push_back(static_cast<char>((bits >> shift) & 0xffU));
  for (std::size_t i = 0; i < tail.size(); i += 64) {
    absorb(state, std::string_view(tail).substr(i, 64), constants);
  }
  std::string text;
  for (const std::uint32_t word : state) text += fmt::format("{:08x}", word);
  return text;
}

std::string version() { return RAISER_VERSION; }

std::string compiler() {
#if defined(__clang__)
  return fmt::format("clang {}.{}.{}", __clang_major__, __clang_minor__, __clang_patchlevel__);
#else
  return fmt::format("gcc {}.{}.{}", __GNUC__, __GNUC_MINOR__, __GNUC_PATCHLEVEL__);
#endif
}

Provenance provenance(const std::filesystem::path& case_file, std::string_view content) {
  return {version(), compiler(), case_file.string(), sha256(content)};
}

Provenance provenance(const std::filesystem::path& case_file) {
  std::ifstream input(case_file, std::ios::binary);
  std::ostringstream content;
  content << input.rdbuf();
  if (!input || !content) return {version(), compiler(), case_file.string(), ""};
  return provenance(case_file, content.str());
}

}  // namespace raiser::io
