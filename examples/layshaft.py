"""The layshaft of the compost drum drive as a script: the words of layshaft.toml (invented), one of its limits."""

import fe_shaft as fs

segments = [
    fs.Segment("left_journal", length="19 mm", diameter="30 mm", fillet="1 mm"),
    fs.Segment("wheel_seat", length="38 mm", diameter="38 mm", fillet="1.5 mm"),
    fs.Segment("collar", length="10 mm", diameter="46 mm"),
    fs.Segment("pinion_body", length="52 mm", diameter="51 mm"),
    fs.Segment("right_collar", length="8 mm", diameter="40 mm", fillet="1.5 mm"),
    fs.Segment("right_journal", length="19 mm", diameter="30 mm", fillet="1 mm"),
    fs.Segment("stub", length="45 mm", diameter="24 mm", fillet="1 mm"),
]
shaft = fs.Shaft("layshaft", segments, material="42CrMo4")
give = {"radial": "~93 N/um", "tilt": "~5 N m/mrad"}
left = fs.Bearing("lay_left", at="left_journal", holds=["radial"], stiffness=give)
right = fs.Bearing("lay_right", at="right_journal", holds=["radial", "axial"], stiffness=give | {"axial": "~60 N/um"})
teeth = {"wheel": {"teeth": 85, "normal_module": "2 mm"}, "pinion": {"teeth": 19, "normal_module": "3 mm"}}
wheel = fs.Gear("wheel", at="wheel_seat", helix="15 deg left", facewidth="32 mm", mate="9 o'clock", **teeth["wheel"])
pinion = fs.Gear(
    "pinion", at="pinion_body", helix="12 deg left", facewidth="50 mm", mate="3 o'clock", **teeth["pinion"]
)
handwheel = fs.Mass("barring_wheel", at="stub", mass="4.1 kg", cg_at="stub.right")
flow = {"enters": "wheel", "leaves": "pinion"}
cases = [
    fs.Case("running", **flow, power="5.5 kW", speed="393.7 rpm", turns="clockwise from left"),
    fs.Case("starting", like="running", torque_factor=2.2),
    fs.Case("reversed_jam", **flow, torque="332.6 N m", speed="0 rpm", turns="counterclockwise from left"),
]
limit = fs.Limit("wheel_deflection", of="wheel", quantity="deflection", max="20 um", cases=["running"])
parts = [shaft, left, right, wheel, pinion, handwheel]

model = fs.Model("Layshaft of the compost drum drive", parts, cases, limits=[limit], gravity="down")
results = fs.solve(model)
comparison = fs.compare(model)
print(results)  # what `fe-shaft solve` prints
print(comparison)  # pins beside bearings
fs.picture(comparison, "layshaft.png")  # fs.view(comparison) opens the window
