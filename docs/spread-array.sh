#!/bin/bash
# One part of a spread on a cluster that Slurm runs:
#   sbatch --array=1-64 docs/spread-array.sh planet.yaml parts --draws 10000000
# and when all parts have ended well:
#   perilag gather parts/* -o out/planet/spread
# A part that was stopped goes on where it was: `scontrol requeue`, or submit the array again.
#SBATCH --job-name=perilag-spread
#SBATCH --cpus-per-task=1
#SBATCH --requeue
scenario=$1
parts=$2
shift 2
exec perilag spread "$scenario" -o "$parts/$SLURM_ARRAY_TASK_ID" \
  --shard "$SLURM_ARRAY_TASK_ID/$SLURM_ARRAY_TASK_COUNT" --workers "${SLURM_CPUS_PER_TASK:-1}" --resume --quiet "$@"
