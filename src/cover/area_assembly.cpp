#include "cover/area_assembly.hpp"

#include "format/area_container.hpp"
#include "format/atomic_file.hpp"

namespace merestone {

namespace {

class Assembly {
 public:
  Assembly(AreaWriter writer, AtomicFile file) : writer_(std::move(writer)), file_(std::move(file)) {}

  Result<WrittenArea> run(const AreaResult& result, const BlockStore& store, bool outline,
                          const nlohmann::json& provenance) {
    if (auto problem = put(writer_.header(provenance))) return *problem;
    if (auto problem = put(pack_trunk(result.trunk.block))) return *problem;
    for (const BlockPlace& place : result.trunk.places)
      if (auto problem = outline ? put_outline(store, place) : put(store.packed(place))) return *problem;
    const auto put_list = [this](const PackedBlock& block) { return put(writer_.block(block)); };
    if (auto problem = for_each_component_block(result.components, put_list)) return *problem;
    if (auto problem = put(writer_.end())) return *problem;
    if (auto problem = file_.commit()) return *problem;
    return WrittenArea{bytes_, writer_.blocks(), writer_.digest()};
  }

 private:
  std::optional<Failure> put(const std::string& bytes) {
    bytes_ += bytes.size();
    return file_.write(bytes);
  }
  std::optional<Failure> put(const Result<PackedBlock>& block) {
    return block ? put(writer_.block(*block)) : block.failure();
  }
  std::optional<Failure> put_outline(const BlockStore& store, const BlockPlace& place) {
    const Result<PackedBlock> packed = store.packed(place);
    if (!packed) return packed.failure();
    const Result<CoverBlock> block = store.block(place);
    if (!block) return block.failure();
    return put(writer_.absent(absent_of(*block, *packed)));
  }

  AreaWriter writer_;
  AtomicFile file_;
  std::uint64_t bytes_ = 0;
};

}  // namespace

Result<WrittenArea> assemble_area(const AreaResult& result, const BlockStore& store, const std::string& path,
                                  bool outline, const nlohmann::json& provenance) {
  Result<AreaWriter> writer = AreaWriter::create(result.header);
  if (!writer) return writer.failure();
  Result<AtomicFile> file = AtomicFile::create(path);
  if (!file) return file.failure();
  return Assembly(std::move(writer.value()), std::move(file.value())).run(result, store, outline, provenance);
}

}  // namespace merestone
