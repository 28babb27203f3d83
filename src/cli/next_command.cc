#include "cli/next_command.h"

#include <algorithm>
#include <memory>
#include <nlohmann/json.hpp>
#include <optional>

#include "base/numbers.h"
#include "base/text.h"
#include "cli/command.h"
#include "session/session.h"

namespace nearpit::cli {
namespace {

struct NextOptions {
  std::string file;
  std::string crew;
  std::string from;
  bool json = false;
};

// "X,Y" in metres.
Result<std::optional<Point>> start_of(const NextOptions& options, const Session& session) {
  const std::string& text = options.from;
  if (text.empty()) return std::optional<Point>();
  const std::size_t comma = text.find(',');
  const auto x = comma == std::string::npos ? std::nullopt : parse_double(text.substr(0, comma));
  const auto y = comma == std::string::npos ? std::nullopt : parse_double(text.substr(comma + 1));
  if (x && y) return std::optional<Point>(Point{*x, *y});
  const auto pit = session.model().name_of(text);
  if (pit && pit->node != kNoNode)
    return std::optional<Point>(session.model().survey().ground().frame.ground(pit->node));
  return Error(ErrorKind::kBadInput, "--from: " + in_quotes(text) +
                                         " is no place; legal: X,Y in metres of the plan's "
                                         "coordinates such as 120.5,80, or a pit");
}

Json as_json(const DigOrder& order, const SurveyModel& model) {
  Json due = Json::array();
  for (const DigStop& stop : order.due) {
    due.push_back({{"pit", model.label(stop.node)},
                   {"because", stop.first_sample ? "first sample" : "neighbour"},
                   {"of", model.labels_of(stop.of)},
                   {"ring", stop.ring},
                   {"x", stop.place.x},
                   {"y", stop.place.y},
                   {"distance_m", stop.distance_m},
                   {"bearing_deg", stop.bearing_deg},
                   {"crew", nullptr}});
  }
  Json asked = Json::array();
  for (const NodeId id : order.asked) {
    const Point place = model.survey().ground().frame.ground(id);
    asked.push_back({{"pit", model.label(id)}, {"x", place.x}, {"y", place.y}});
  }
  return {{"survey", model.plan().survey},
          {"due", std::move(due)},
          {"first_sample_left", order.first_sample_left},
          {"neighbours_left", order.neighbours_left},
          {"open_clusters", order.open_clusters},
          {"tell", Json::array()},
          {"asked", std::move(asked)}};
}

std::string reason_text(const DigStop& stop, const SurveyModel& model) {
  if (stop.first_sample) return "grid pit";
  const std::string steps = stop.ring == 1 ? "one step out" : std::to_string(stop.ring) + " steps out";
  return "next to " + list_in_words(model.labels_of(stop.of)) + " (" + steps + ")";
}

std::string as_text(const DigOrder& order, const SurveyModel& model) {
  std::string text = model.plan().survey + ": ";
  if (order.due.empty()) {
    text += "nothing left to dig\n";
  } else {
    text += std::to_string(order.due.size()) + (order.due.size() == 1 ? " pit" : " pits") +
            " to dig: " + std::to_string(order.first_sample_left) + " grid, " + std::to_string(order.neighbours_left) +
            " around finds; " + std::to_string(order.open_clusters) + " open " +
            (order.open_clusters == 1 ? "cluster" : "clusters") + "\n";
    text += "Walk, in order (metres and grid bearing from the stop before):\n";
  }
  std::size_t number = 0;
  std::size_t widest = 0;
  for (const DigStop& stop : order.due)
    widest = std::max(widest, utf8_length(model.label(stop.node)));
  for (const DigStop& stop : order.due) {
    text += padded(std::to_string(++number), 5, true) + "  " + padded(model.label(stop.node), widest, false) +
            padded(format_fixed(stop.distance_m, 1), 8, true) + " m" +
            padded(format_fixed(stop.bearing_deg, 0), 5, true) + "°  " + reason_text(stop, model) + "\n";
  }
  if (!order.asked.empty()) {
    text += "Judgement pits asked for: " + list_in_words(model.labels_of(order.asked)) + "\n";
  }
  return text;
}

// A plan that lists crews has no others.
Status check_crew(const std::string& crew, const std::vector<std::string>& crews) {
  if (crew.empty() || crews.empty() || std::find(crews.begin(), crews.end(), crew) != crews.end()) return ok_status();
  return Error(ErrorKind::kBadInput,
               "--crew: " + in_quotes(crew) + " is no crew of the plan; legal: " + join(crews, ", "));
}

int run_next(const NextOptions& options) {
  auto environment = real_environment();
  if (!environment) return fail(environment.error());
  const auto session = Session::open(options.file, *environment, true);
  if (!session) return fail(session.error());
  if (const Status known = check_crew(options.crew, session->model().plan().crews); !known) return fail(known.error());
  const auto from = start_of(options, *session);
  if (!from) return fail(from.error());
  const DigOrder order = session->dig_order(options.crew, *from);
  return options.json ? print_json(as_json(order, session->model())) : print(as_text(order, session->model()));
}

}  // namespace

void add_next(CommandLine& line) {
  auto options = std::make_shared<NextOptions>();
  line.command("next", "pits to dig, in walking order, with why")
      .survey_file(&options->file)
      .option("--crew", "NAME", &options->crew, "start where this crew dug last")
      .option("--from", "PLACE", &options->from, "start at X,Y (metres) or at a pit")
      .flag("--json", &options->json, "one JSON object")
      .run([options] { return run_next(*options); });
}

}  // namespace nearpit::cli
