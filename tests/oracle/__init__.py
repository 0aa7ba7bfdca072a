"""An independent truth for the tests: a chain of beam elements solved with many decimal digits.

Imports nothing of the package under test. Decimal arithmetic only, no matrix library.

digits          numbers, pi, sines, Gauss points, a small linear solver
element         one cylinder or cone: flexibility, stiffness, loads
supports        ties, springs and seats at a node
element_frame   the chain: supports, load cases, solution node by node
shaft_spec      a whole shaft as plain data, brought to the chain
"""
