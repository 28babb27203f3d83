#include "session/make_survey.h"

#include <algorithm>
#include <filesystem>
#include <utility>

#include "exchange/boundary_geojson.h"
#include "exchange/text_file.h"
#include "position/crs.h"
#include "record/json_fields.h"
#include "record/json_text.h"
#include "record/plan.h"
#include "session/layer_content.h"
#include "session/survey_model.h"
#include "store/survey_file.h"

namespace nearpit {
namespace {

// The plan's text, to say on which line a field stands.
struct PlanText {
  std::string path;
  std::string text;
};

// Findings that begin with a field of the plan ("crs: …", with the plan's path before it or not), each led by path and line.
Error in_plan(const PlanText& plan, const Error& error) {
  const auto document = read_json(plan.text, plan.path);
  std::vector<std::string> lines;
  for (std::string line : error.lines) {
    if (const std::string lead = plan.path + ": "; line.starts_with(lead)) line.erase(0, lead.size());
    std::string pointer = "/" + line.substr(0, line.find(':'));
    std::replace(pointer.begin(), pointer.end(), '.', '/');
    lines.push_back(plan.path + ":" + std::to_string(document ? document->line(pointer) : 1) + ": " + line);
  }
  return {error.kind, std::move(lines)};
}

// The boundary's file lies beside the plan unless its path is absolute.
Result<MultiPolygon> boundary_from_file(const Plan& plan, const PlanText& written) {
  const std::filesystem::path beside = std::filesystem::path(written.path).parent_path() / plan.boundary_file;
  const auto text = read_text_file(beside.string());
  if (!text) return in_plan(written, {text.error().kind, "boundary.file: " + text.error().lines.front()});
  NEARPIT_ASSIGN(lonlat, read_boundary_geojson(*text, beside.string()));
  const auto transformed = lonlat_to_ground(lonlat, plan.crs);
  if (!transformed) return in_plan(written, transformed.error());
  const MultiPolygon& ground = *transformed;
  if (const auto problem = polygon_problem(ground)) {
    return Error(ErrorKind::kBadInput, beside.string() + ": the boundary " + *problem + "; redraw it");
  }
  return ground;
}

MadeSurvey summary(const SurveyModel& model) {
  const SurveyGround& ground = model.survey().ground();
  MadeSurvey made;
  made.survey = model.plan().survey;
  made.units = unit_word(ground.units.kind, true);
  made.pits = ground.frame.size();
  made.first_sample = ground.sample.nodes;
  made.boundary_m2 = area_m2(model.plan().boundary);
  made.crs = model.plan().crs;
  for (std::size_t i = 0; i < ground.areas.list.size(); ++i) {
    made.areas.push_back({ground.areas.list[i].name, ground.units.count[i], ground.sample.drawn[i].size()});
  }
  made.warnings = first_sample_warnings(ground.areas, ground.units, ground.sample);
  return made;
}

}  // namespace

Result<MadeSurvey> make_survey(const std::string& plan_path, const std::string& file, Environment& environment) {
  NEARPIT_ASSIGN(text, read_text_file(plan_path));
  NEARPIT_ASSIGN(plan, read_plan(text, plan_path));
  const PlanText written{plan_path, text};
  auto crs = crs_facts(plan.crs);
  if (!crs) return in_plan(written, crs.error());
  if (!plan.boundary_file.empty()) {
    auto boundary = boundary_from_file(plan, written);
    if (!boundary) return boundary.error();
    plan.boundary = std::move(*boundary);
    text = with_boundary(text, plan.boundary);
  }
  auto made = make_ground(plan, plan_path, nullptr);
  if (!made) return in_plan(written, made.error());
  auto ground = std::move(made).value();
  FileStart start;
  start.survey_id = environment.new_id();
  start.plan = text;
  start.drawn = ground->sample.drawn;
  start.epsg = crs->epsg;
  start.crs_name = crs->name;
  start.crs_wkt = crs->wkt;
  start.finds = plan.finds;
  const SurveyModel model(std::move(plan), std::move(ground));
  start.made_at = in_zone(environment.clock->now(), model.zone());
  NEARPIT_TRY(SurveyFile::create(file, start, layer_rows(model)));
  return summary(model);
}

}  // namespace nearpit
