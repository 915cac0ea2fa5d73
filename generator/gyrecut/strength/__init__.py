"""Whether walls, lid, joints and bin hold the suction: formulas in SI, and what they find."""
