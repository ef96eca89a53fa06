#!/usr/bin/python3
"""Instants at which clocks in a zone show a local time, by Python's zoneinfo: none, one or two.

Usage: /usr/bin/python3 readings-zones.py > readings-zones.json
"""
import hashlib
import json
import pathlib
import platform
from datetime import datetime, timedelta, timezone
from zoneinfo import ZoneInfo

CHANGES = {
    'Europe/Paris': ['2021-03-28', '2021-10-31', '1996-10-27'],
    'Europe/London': ['2021-03-28', '2021-10-31'],
    'America/New_York': ['2021-03-14', '2021-11-07', '2006-04-02'],
    'America/St_Johns': ['2010-03-14', '2010-11-07'],
    'America/Sao_Paulo': ['2017-10-15', '2018-02-18'],
    'America/Santiago': ['2021-09-05', '2021-04-04'],
    'Australia/Lord_Howe': ['2021-10-03', '2021-04-04'],
    'Pacific/Apia': ['2011-12-30', '2011-12-31'],
    'Asia/Kathmandu': ['2021-06-01'],
    'Africa/Casablanca': ['2022-03-27', '2022-05-08'],
    'Atlantic/Azores': ['2021-03-28', '2021-10-31'],
    'UTC': ['2021-03-28'],
}


def instants(zone, local):
    found = set()
    for fold in (0, 1):
        instant = local.replace(tzinfo=zone, fold=fold).astimezone(timezone.utc)
        if instant.astimezone(zone).replace(tzinfo=None) == local:
            found.add(int(instant.timestamp() * 1000))
    return sorted(found)


cases = []
for name, days in CHANGES.items():
    zone = ZoneInfo(name)
    for day in days:
        start = datetime.fromisoformat(day) - timedelta(hours=3)
        for step in range(0, 33 * 60, 15):
            local = start + timedelta(minutes=step)
            cases.append([name, local.isoformat(timespec='minutes'), instants(zone, local)])

script = pathlib.Path(__file__)
print(json.dumps({
    'provenance': {
        'tool': 'python zoneinfo', 'version': f'python {platform.python_version()}',
        'script': script.name, 'scriptSha256': hashlib.sha256(script.read_bytes()).hexdigest(),
    },
    'cases': cases,
}))
