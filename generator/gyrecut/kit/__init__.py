"""The files a build leaves behind: meshes, CAD, print job, manifest and summary.

Only `cautions`, `contents`, `folder`, `manifest` and `summary` load without the CAD kernel, so
nothing is imported here.
"""
