"""Published formulas for one cyclone, one correlation a function.

Plain SI numbers, floats or numpy arrays that broadcast. What comes out of a formula is a
forecast by that formula alone; `separation` sets them side by side.
"""
