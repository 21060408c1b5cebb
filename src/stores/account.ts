import { shallowRef } from 'vue'
import { defineStore } from 'pinia'
import type { WireDevice } from '../../shared/api/people'
import { toProblem } from '../api/problem'
import type { Problem } from '../api/problem'
import * as api from '../api/session.api'

/** What the account screens need beside the session itself. */
export const useAccountStore = defineStore('account', () => {
  const devices = shallowRef<WireDevice[] | null>(null)
  const devicesProblem = shallowRef<Problem | null>(null)
  const demoAccounts = shallowRef<api.DemoAccount[]>([])

  async function loadDevices(): Promise<void> {
    devicesProblem.value = null
    try {
      devices.value = await api.listDevices()
    } catch (thrown) {
      devicesProblem.value = toProblem(thrown)
    }
  }

  async function endDevice(id: string): Promise<void> {
    await api.endDevice(id)
    devices.value = devices.value?.filter((device) => device.id !== id) ?? null
  }

  /** An installation without a demo answers 404: then there is nothing to offer. */
  async function loadDemoAccounts(): Promise<void> {
    try {
      demoAccounts.value = await api.listDemoAccounts()
    } catch {
      demoAccounts.value = []
    }
  }

  return {
    devices, devicesProblem, demoAccounts, loadDevices, endDevice, loadDemoAccounts,
    changePassword: api.changePassword,
    forgotPassword: api.forgotPassword,
    resetPassword: api.resetPassword,
    getInvitation: api.getInvitation,
    listSentMail: api.listSentMail,
  }
})
