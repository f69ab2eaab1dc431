#!/bin/bash
# A Slurm of one node on loopback, in one folder, without systemd; as root. Usage: slurm.sh start DIR | slurm.sh stop DIR
set -euo pipefail
dir=$(realpath -m "${2:?folder}")
name=$(hostname -s)
cpus=$(nproc)

start() {
  mkdir -p "$dir"/{state,spool,log,munge}
  chmod 755 "$dir"
  install -d -o munge -g munge -m 0700 "$dir/munge/etc"
  install -d -o munge -g munge -m 0755 "$dir/munge/run"
  chown munge:munge "$dir/munge"
  head -c 1024 /dev/urandom > "$dir/munge/etc/key"
  chown munge:munge "$dir/munge/etc/key"
  chmod 400 "$dir/munge/etc/key"
  runuser -u munge -- munged --foreground --key-file="$dir/munge/etc/key" --socket="$dir/munge/run/sock" \
    --pid-file="$dir/munge/run/pid" --seed-file="$dir/munge/run/seed" --log-file="$dir/munge/run/log" \
    > "$dir/log/munged.out" 2>&1 < /dev/null &
  echo $! > "$dir/1-munged.pid"
  for _ in $(seq 100); do [ -S "$dir/munge/run/sock" ] && break; sleep 0.1; done
  [ -S "$dir/munge/run/sock" ] || { cat "$dir/log/munged.out" >&2; return 1; }
  cat > "$dir/slurm.conf" << CONF
ClusterName=one
SlurmctldHost=$name(127.0.0.1)
SlurmUser=root
SlurmdUser=root
AuthType=auth/munge
AuthInfo=socket=$dir/munge/run/sock
CommunicationParameters=NoInAddrAny,NoCtldInAddrAny
SlurmctldPort=26917
SlurmdPort=26918
StateSaveLocation=$dir/state
SlurmdSpoolDir=$dir/spool
SlurmctldPidFile=$dir/slurmctld.pid
SlurmdPidFile=$dir/slurmd.pid
SlurmctldLogFile=$dir/log/slurmctld.log
SlurmdLogFile=$dir/log/slurmd.log
ProctrackType=proctrack/linuxproc
TaskPlugin=task/none
JobAcctGatherType=jobacct_gather/none
AccountingStorageType=accounting_storage/none
SelectType=select/cons_tres
SelectTypeParameters=CR_Core
SchedulerParameters=sched_interval=2,batch_sched_delay=0,defer_batch
MpiDefault=none
SwitchType=switch/none
ReturnToService=2
MinJobAge=3600
KillWait=5
NodeName=$name NodeAddr=127.0.0.1 CPUs=$cpus Sockets=1 CoresPerSocket=$cpus ThreadsPerCore=1 RealMemory=1000 State=UNKNOWN
PartitionName=main Nodes=$name Default=YES MaxTime=INFINITE State=UP
CONF
  echo "CgroupPlugin=autodetect" > "$dir/cgroup.conf"
  export SLURM_CONF="$dir/slurm.conf"
  slurmctld -D > "$dir/log/slurmctld.out" 2>&1 < /dev/null &
  echo $! > "$dir/2-slurmctld.pid"
  sleep 1
  slurmd -D > "$dir/log/slurmd.out" 2>&1 < /dev/null &
  echo $! > "$dir/3-slurmd.pid"
  for _ in $(seq 300); do
    timeout 5 sinfo -h -o %T 2> /dev/null | grep -q idle && return
    sleep 0.2
  done
  tail -n 20 "$dir"/log/* >&2
  return 1
}

# Only what start has begun there, the last first.
stop() {
  for file in $(ls -r "$dir"/*-*.pid 2> /dev/null); do
    pid=$(cat "$file")
    kill "$pid" 2> /dev/null || true
    for _ in $(seq 50); do kill -0 "$pid" 2> /dev/null || break; sleep 0.1; done
    kill -9 "$pid" 2> /dev/null || true
  done
}

"${1:?start or stop}"
