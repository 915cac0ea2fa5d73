"""From a stage of a profile to every dimension of its separator, in millimetres; no CAD."""
