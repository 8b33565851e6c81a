#include "format/area_container.hpp"

#include <cmath>

#include "format/container_layout.hpp"
#include "format/cover_payload.hpp"

namespace merestone {

Read<AreaReader> AreaReader::open(Read<ContainerReader> frame) {
  if (const ReadFault* fault = fault_of(frame)) return *fault;
  auto& reader = std::get<ContainerReader>(frame);
  Result<AreaHeader> header = read_area_header(reader.header());
  if (!header) return damaged("header", header.failure().message);
  reader.admit_absent(kCoverSummaryLength);
  return AreaReader(std::move(reader), std::move(header.value()));
}

AreaReader::Next AreaReader::next() {
  ContainerReader::Next read = frame_.next();
  if (auto* fault = std::get_if<ReadFault>(&read)) return std::move(*fault);
  if (auto* block = std::get_if<StoredBlock>(&read)) return std::move(*block);
  if (std::holds_alternative<ContainerEnd>(read))
    return AreaEnd{frame_.digests().size(), container_digest(to_json(header_), frame_.digests())};
  const Read<AbsentCover> absent = open_absent(std::get<AbsentBlock>(read));
  if (const ReadFault* fault = fault_of(absent)) return *fault;
  return std::get<AbsentCover>(absent);
}

Result<AreaWriter> AreaWriter::create(const AreaHeader& header) {
  if (header.cover && !(std::isfinite(header.cover->plan.root.x) && std::isfinite(header.cover->plan.root.y)))
    return Failure{"the corner of the root is not finite"};
  const nlohmann::json said = to_json(header);
  nlohmann::json whole = said;
  whole["format"] = kContainerFormat;
  whole["version"] = 1;
  if (const Result<AreaHeader> again = read_area_header(whole); !again)
    return Failure{"the header of an area container cannot be written: " + again.failure().message};
  return AreaWriter(said);
}

std::string AreaWriter::header(const nlohmann::json& provenance) {
  nlohmann::json whole = header_;
  whole["provenance"] = provenance;
  return frame_.header(std::move(whole));
}

std::string AreaWriter::absent(const AbsentCover& block) {
  CoverBlock said;
  said.column = block.column;
  said.row = block.row;
  said.grade = block.grade;
  said.outside_cells = block.outside_cells;
  said.inside_cells = block.inside_cells;
  std::string summary;
  put_cover_summary(summary, said);
  return frame_.absent(block.entries, block.payload_length, summary, block.digest);
}

}  // namespace merestone
