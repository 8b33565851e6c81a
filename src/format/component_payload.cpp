#include "format/component_payload.hpp"

#include <tuple>

#include "format/container_layout.hpp"

namespace merestone {

namespace {

constexpr std::size_t kComponentLength = 4 + 8 + 8 + 4 + 2 + 2;

std::string component_name(std::size_t i) { return "component " + std::to_string(i); }

Component take_component(ByteCursor& bytes) {
  Component component;
  component.period = bytes.u32();
  component.re = bytes.number();
  component.im = bytes.number();
  component.radius_exponent = bytes.i32();
  component.coefficients = bytes.u16();
  component.bits = bytes.u16();
  return component;
}

}  // namespace

bool stands_before(const Component& a, const Component& b) { return std::tie(a.re, a.im) < std::tie(b.re, b.im); }

void put_components(std::string& out, std::span<const Component> components) {
  for (const Component& component : components) {
    put_integer(out, component.period, 4);
    put_number(out, component.re);
    put_number(out, component.im);
    put_integer(out, static_cast<std::uint32_t>(component.radius_exponent), 4);
    put_integer(out, component.coefficients, 2);
    put_integer(out, component.bits, 2);
  }
}

Result<std::vector<Component>> take_components(ByteCursor& bytes) {
  const std::size_t count = bytes.left() / kComponentLength;
  if (bytes.left() % kComponentLength != 0) return Failure{"the last component is not whole"};
  if (count < 1 || count > kComponentsOfBlock)
    return Failure{"it has " + std::to_string(count) + " components; a block has 1 to 4,096"};
  std::vector<Component> components;
  components.reserve(count);
  for (std::size_t i = 0; i < count; ++i) {
    const Component component = take_component(bytes);
    if (!bytes.ok()) return Failure{component_name(i) + " has a coordinate that is not finite or is -0"};
    if (component.period == 0) return Failure{component_name(i) + " has the period 0"};
    if (i > 0 && !stands_before(components.back(), component))
      return Failure{component_name(i) + " does not come after the one before it, by re, then by im"};
    components.push_back(component);
  }
  return components;
}

}  // namespace merestone
