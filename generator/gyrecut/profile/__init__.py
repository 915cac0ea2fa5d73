"""The profile a person writes: read, checked, in SI."""

from gyrecut.profile.models import Profile, profile_hash
from gyrecut.profile.problems import Problem, ProfileError
from gyrecut.profile.reading import at_its_line, load_profile
from gyrecut.profile.schema import profile_schema
from gyrecut.profile.starter import starter_text

__all__ = [
    "Problem",
    "Profile",
    "ProfileError",
    "at_its_line",
    "load_profile",
    "profile_hash",
    "profile_schema",
    "starter_text",
]
