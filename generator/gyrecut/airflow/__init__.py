"""Air and its way to the separator: state of the air, hoses, entries and transitions.

Plain SI numbers, floats or numpy arrays that broadcast; angles in radians.
"""
