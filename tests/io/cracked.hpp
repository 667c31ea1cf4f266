#pragma once

namespace raiser::io::test {

/// Invented: a strap with a crack from either edge, two loads.
inline constexpr const char* cracked_strap = R"toml(raiser = 1
title = "Strap with two cracks (invented data)"
[plate]
length = "200 mm"
width = "50 mm"
thickness = "4 mm"
[material]
youngs_modulus = "70 GPa"
poissons_ratio = 0.33
[[crack]]
name = "edge crack"
edge = "top"
length = "10 mm"
tips = ["A"]
[[crack]]
name = "flaw"
edge = "bottom"
at = "60 mm"
length = "8 mm"
angle = "30 deg"
[[load]]
name = "pull"
kind = "tension"
stress = "50 MPa"
[[load]]
name = "bend"
kind = "bending"
stress = "20 MPa"
[ask]
results = ["stress intensity", "T-stress"]
[[ask.result]]
name = "K at A"
of = "stress intensity"
tip = "A"
)toml";

/// Invented: a strap with a bolt hole and a crack out of it.
inline constexpr const char* cracked_hole = R"toml(raiser = 1
title = "Strap, crack at the hole (invented data)"
[plate]
length = "160 mm"
width = "40 mm"
thickness = "3 mm"
[material]
youngs_modulus = "70 GPa"
poissons_ratio = 0.33
[[hole]]
name = "pin"
shape = "circle"
diameter = "10 mm"
[[crack]]
name = "hole crack"
from = "pin"
place = "90 deg"
length = "3 mm"
[[load]]
kind = "tension"
stress = "50 MPa"
)toml";

}  // namespace raiser::io::test
