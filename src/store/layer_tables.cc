#include "store/layer_tables.h"

#include <algorithm>
#include <iterator>
#include <set>

#include "store/geopackage_blob.h"

namespace nearpit::store {
namespace {

Value said(const std::string& text) {
  if (text.empty()) return std::monostate{};
  return text;
}

template <class T>
Value said(const std::optional<T>& value) {
  if (!value) return std::monostate{};
  return *value;
}

Value truth(bool value) { return static_cast<std::int64_t>(value ? 1 : 0); }

void put_outline(LayerValues& row, const MultiPolygon& outline, int srs_id) {
  if (outline.empty()) {
    row.values.insert(row.values.begin(), std::monostate{});
    return;
  }
  row.values.insert(row.values.begin(), Blob{multipolygon_blob(outline, srs_id)});
  row.box = bounding_box(outline);
}

LayerTable with_finds(LayerTable table, const LayerShape& shape) {
  table.columns.insert(table.columns.end(), shape.find_columns.begin(), shape.find_columns.end());
  return table;
}

std::string ascii_lower(std::string text) {
  for (char& c : text) {
    if (c >= 'A' && c <= 'Z') c = static_cast<char>(c - 'A' + 'a');
  }
  return text;
}

LayerContent boundary_content(const LayerRows& rows, const LayerShape& shape) {
  LayerValues row{rows.survey, {rows.survey}, {}};
  put_outline(row, rows.boundary, shape.srs_id);
  return {{"boundary", "survey", {"geom", "survey"}}, {std::move(row)}};
}

LayerContent strata_content(const std::vector<AreaRow>& rows, const LayerShape& shape) {
  LayerContent content{{"strata", "name", {"geom", "name", "nodes", "primary_units", "drawn"}}, {}};
  for (const AreaRow& row : rows) {
    LayerValues values{row.name, {row.name, row.nodes, row.primary_units, row.drawn}, {}};
    put_outline(values, row.outline, shape.srs_id);
    content.rows.push_back(std::move(values));
  }
  return content;
}

}  // namespace

std::vector<std::string> find_columns(const std::vector<std::string>& finds) {
  std::vector<std::string> columns;
  std::set<std::string> taken;
  for (const std::string& find : finds) {
    std::string column = "find_" + find;
    for (int copy = 2; !taken.insert(ascii_lower(column)).second; ++copy) {
      column = "find_" + find + "_" + std::to_string(copy);
    }
    columns.push_back(column);
  }
  return columns;
}

LayerTable pits_table(const LayerShape& shape) {
  return with_finds({"pits",
                     "label",
                     {"geom", "label", "outcome", "area", "first_sample", "ring", "chosen_by", "reason", "crew",
                      "dug_at", "depth_cm", "stop", "bag", "note"}},
                    shape);
}

LayerValues values_of(const PitRow& row, const LayerShape& shape) {
  LayerValues values{row.label,
                     {Blob{point_blob(row.place, shape.srs_id)}, row.label, row.outcome, said(row.area),
                      truth(row.first_sample), said(row.ring), said(row.chosen_by), said(row.reason), said(row.crew),
                      said(row.dug_at), said(row.depth_cm), said(row.stop), said(row.bag), said(row.note)},
                     Box{row.place, row.place}};
  for (const auto& count : row.finds)
    values.values.push_back(said(count));
  return values;
}

LayerContent clusters_content(const std::vector<ClusterRow>& rows, const LayerShape& shape) {
  LayerContent content{
      with_finds({"clusters", "label", {"geom", "label", "pits", "in_first_sample", "area_m2", "closed"}}, shape), {}};
  for (const ClusterRow& row : rows) {
    LayerValues values{row.label, {row.label, row.pits, row.in_first_sample, row.area_m2, truth(row.closed)}, {}};
    put_outline(values, row.outline, shape.srs_id);
    values.values.insert(values.values.end(), row.finds.begin(), row.finds.end());
    content.rows.push_back(std::move(values));
  }
  return content;
}

LayerContent closed_areas_content(const std::vector<ClosedAreaRow>& rows, const LayerShape& shape) {
  LayerContent content{{"closed_areas", "object", {"geom", "object", "name", "reason", "closed_by", "open_again"}}, {}};
  for (const ClosedAreaRow& row : rows) {
    LayerValues values{
        row.object, {row.object, said(row.name), said(row.reason), said(row.by), truth(row.open_again)}, {}};
    put_outline(values, row.outline, shape.srs_id);
    content.rows.push_back(std::move(values));
  }
  return content;
}

std::vector<LayerContent> all_contents(const LayerRows& rows, const LayerShape& shape) {
  LayerContent pits{pits_table(shape), {}};
  pits.rows.reserve(rows.pits.size());
  std::transform(rows.pits.begin(), rows.pits.end(), std::back_inserter(pits.rows),
                 [&](const PitRow& row) { return values_of(row, shape); });
  std::vector<LayerContent> contents;
  contents.push_back(std::move(pits));
  contents.push_back(clusters_content(rows.clusters, shape));
  contents.push_back(boundary_content(rows, shape));
  contents.push_back(strata_content(rows.strata, shape));
  contents.push_back(closed_areas_content(rows.closed_areas, shape));
  return contents;
}

}  // namespace nearpit::store
