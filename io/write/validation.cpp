#include "io/write/validation.hpp"

#include <fmt/format.h>

#include <cmath>

#include "io/write/layout.hpp"
#include "io/write/validation_words.hpp"

namespace raiser::io {
namespace {

using validation::Agreement;
using validation::Family;
using validation::FamilyResult;
using validation::HeldValue;
using validation::PointResult;
using validation::Published;
using validation::record;

std::string verdict(const HeldValue& held) {
  switch (held.agreement) {
    case Agreement::exact:
      return fmt::format("{:.0f} digits", std::floor(*held.digits));
    case Agreement::not_exact:
      return "NOT EXACT";
    case Agreement::within_claim:
      return "within";
    case Agreement::beyond_claim:
      return "BEYOND";
    case Agreement::as_found:
      return "as known";
    case Agreement::not_as_found:
      return "NEW";
    case Agreement::outside_range:
      return "outside";
  }
  return "";
}

// The verdict in full, for the page.
std::string sentence(const HeldValue& held) {
  const Published& from = record(held.reference);
  switch (held.agreement) {
    case Agreement::exact:
      return fmt::format("exact to {:.1f} digits", *held.digits);
    case Agreement::not_exact:
      return "**does not agree with an exact value**";
    case Agreement::within_claim:
      return fmt::format("within the {} claimed", percent(*from.claim));
    case Agreement::beyond_claim:
      return fmt::format("**beyond the {} claimed**", percent(*from.claim));
    case Agreement::as_found:
      return "no claim; as known of it";
    case Agreement::not_as_found:
      return fmt::format("**no claim; farther off than the {} known**", percent(from.accuracy));
    case Agreement::outside_range:
      return "outside its range";
  }
  return "";
}

std::string source_lines(const Family& family) {
  std::string text;
  for (const auto reference : cited_by(family)) {
    const Published& from = record(reference);
    text += wrapped(fmt::format("{}: {}{}. Claims: {}. Known of it: {}.", from.name, from.source,
                                from.from_memory ? ", digits from memory" : "", from.claimed, from.found),
                    "  ", 4);
  }
  return text;
}

std::string point_lines(const PointResult& point) {
  const std::string first = brief(point.parameters.front().value, 4);
  const std::string ours = point.ours.value ? fitted(*point.ours.value, 22) : "none";
  std::string text;
  for (const HeldValue& held : point.held) {
    text += fmt::format("{}{}{}{}{} {}\n", right(text.empty() ? first : "", 7),
                        right(text.empty() ? ours : "", 22),
                        "  " + left(shortened(record(held.reference).name, 20), 21),
                        right(brief(held.published, 5), 8), right(off_text(held.off), 9), verdict(held));
  }
  if (text.empty()) text = right(first, 7) + right(ours, 22) + "\n";
  if (!point.ours.is_settled) text += wrapped("not settled: " + point.ours.reason, "        ", 8);
  return text;
}

std::string parameter_name(const Family& family) {
  return std::string(family.points.front().parameters.front().name);
}

std::string table_cell(std::string_view text) {
  std::string cell;
  for (const char c : text) {
    if (c == '|') cell += '\\';
    cell += c;
  }
  return cell;
}

// Of the family's heading, as pages make them: lower case, blanks to hyphens, no other marks.
std::string anchor(const Family& family) {
  std::string name;
  for (const char c : family.id + " " + family.records) {
    const bool is_kept = (c >= 'a' && c <= 'z') || (c >= '0' && c <= '9') || c == '-';
    if (is_kept) name += c;
    if (c >= 'A' && c <= 'Z') name += static_cast<char>(c - 'A' + 'a');
    if (c == ' ') name += '-';
  }
  return name;
}

std::string page_section(const FamilyResult& result, bool charts) {
  const Family& family = *result.family;
  std::string text =
      fmt::format("## {} ({})\n\n{}. Number: {}.\n\nComputed on {}; tolerance {:.0e}.\n\n", family.id,
                  family.records, family.title, family.ordinate, family.reading, result.tolerance);
  if (charts) text += fmt::format("![{}]({}.svg)\n\n", family.title, family.id);
  for (const auto reference : cited_by(family)) {
    const Published& from = record(reference);
    text +=
        fmt::format("- {}: {}. {}. Claims: {}. Known of it: {}.{}\n", from.name, from.source, from.definition,
                    from.claimed, from.found, from.from_memory ? " Digits from memory." : "");
  }
  text += fmt::format("\nWhy they differ: {}\n\n", family.deviation);
  text += "| parameters | ours | source | published | off | verdict | from memory |\n";
  text += "|---|---|---|---|---|---|---|\n";
  for (const PointResult& point : result.points) {
    const std::string series = point.series.empty() ? "" : "; " + point.series;
    const std::string start =
        fmt::format("| {}{} | {} |", table_cell(parameters_text(point.parameters)), table_cell(series),
                    table_cell(ours_text(point.ours) + (point.ours.is_settled ? "" : " (not settled)")));
    if (point.held.empty()) text += start + " | | | | |\n";
    for (const HeldValue& held : point.held)
      text += fmt::format("{} {} | {} | {} | {} | {} |\n", start, table_cell(record(held.reference).name),
                          brief(held.published, 6), off_text(held.off), sentence(held),
                          record(held.reference).from_memory ? "yes" : "no");
  }
  return text + "\n";
}

std::size_t held_count(const FamilyResult& result) {
  std::size_t count = 0;
  for (const PointResult& point : result.points) count += point.held.size();
  return count;
}

std::string breach_text(const Breach& breach) {
  const Published& from = record(breach.reference);
  const std::string what = breach.kind == Agreement::beyond_claim
                               ? fmt::format("claims {}", percent(*from.claim))
                               : fmt::format("claims nothing, and was known to {}", percent(from.accuracy));
  return fmt::format("{} ({}) {}, and is {} at {}: {} point{} beyond it", from.name,
                     breach.result->family->id, what, off_text(breach.worst), breach.where, breach.points,
                     breach.points == 1 ? "" : "s");
}

}  // namespace

std::string family_table(const FamilyResult& result) {
  const Family& family = *result.family;
  std::string text = fmt::format("{} ({})\n", family.id, family.records) + wrapped(family.title, "  ", 2) +
                     wrapped(family.ordinate, "  ", 2) + source_lines(family);
  text += fmt::format("{}{}  {}{}{} verdict\n", right(parameter_name(family), 7), right("ours", 22),
                      left("source", 21), right("value", 8), right("off", 9));
  std::string series;
  for (const PointResult& point : result.points) {
    if (point.series != series) text += "  " + point.series + "\n";
    series = point.series;
    text += point_lines(point);
  }
  return text + wrapped(family.deviation, "  Why: ", 7);
}

std::string family_legend() {
  return wrapped(
             "off: (published - ours) / |ours|. Verdicts: N digits: exact, and agreeing to so many; within, "
             "BEYOND: against the accuracy that the source claims; as known, NEW: it claims none, and is as "
             "far "
             "off as known so far, or farther; outside: of the range it covers. Ours stands with its error "
             "bound.") +
         wrapped("Linear elastic, 2D, nominal geometry; not a substitute for an independent check.");
}

std::string validation_summary(const std::vector<FamilyResult>& results) {
  std::string text = left("family", 27) + left("records", 10) + right("plates", 7) + right("values", 8) +
                     right("worst off", 11) + "  sound\n";
  for (const FamilyResult& result : results)
    text += left(result.family->id, 27) + left(shortened(result.family->records, 9), 10) +
            right(count(result.points.size()), 7) + right(count(held_count(result)), 8) +
            right(off_text(worst_off(result)), 11) + (is_sound(result) ? "  yes\n" : "  NO\n");
  const auto broken = breaches(results);
  if (!broken.empty()) text += "\nWhere a source is less accurate than it says or was known:\n";
  for (const Breach& breach : broken) text += wrapped(breach_text(breach), "- ", 2);
  return text;
}

std::string validation_page(const std::vector<FamilyResult>& results, bool charts) {
  std::string text =
      "# Published solutions held against raiser\n\n"
      "Written by `raiser validate`. Off is (published - ours) / |ours|: below 0 where the source is low. "
      "Ours "
      "stands with its error bound. A source is held to the accuracy that it claims, if it claims one, else "
      "to "
      "what is known of it from converged solutions; beyond that the table says so, and ours is the better "
      "reference. Sound: every plate solved to its tolerance, every exact solution met within the bound.\n\n"
      "| family | records | plates | published values | worst off in range | sound "
      "|\n|---|---|---|---|---|---|\n";
  for (const FamilyResult& result : results)
    text += fmt::format("| [{}](#{}) | {} | {} | {} | {} | {} |\n", result.family->id, anchor(*result.family),
                        result.family->records, result.points.size(), held_count(result),
                        off_text(worst_off(result)), is_sound(result) ? "yes" : "**no**");
  text += "\n## Where a source is less accurate than it says\n\n";
  const auto broken = breaches(results);
  for (const Breach& breach : broken) text += "- " + breach_text(breach) + ".\n";
  if (broken.empty()) text += "Nowhere.\n";
  text += "\n## Records that no family solves\n\n";
  for (const validation::LeftOut& record : validation::left_out())
    text += fmt::format("- {}, {}: {}.\n", record.records, record.title, record.why);
  text += "\n";
  for (const FamilyResult& result : results) text += page_section(result, charts);
  text.pop_back();
  return text;
}

}  // namespace raiser::io
